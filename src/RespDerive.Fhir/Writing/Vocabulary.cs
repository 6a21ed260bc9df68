using Hl7.Fhir.Model;

namespace RespDerive.Fhir.Writing;

/// <summary>Every URI that our output uses: our own below the configured base, and those of the standards.</summary>
public sealed class Vocabulary(string @base)
{
    /// <summary>UCUM.</summary>
    public const string Ucum = "http://unitsofmeasure.org";

    /// <summary>Standard uncertainty of a Quantity (R4 extension registry, context Quantity).</summary>
    public const string Uncertainty = "http://hl7.org/fhir/StructureDefinition/iso21090-uncertainty";

    internal const string DataOperation = "http://terminology.hl7.org/CodeSystem/v3-DataOperation";
    internal const string ParticipantType = "http://terminology.hl7.org/CodeSystem/provenance-participant-type";
    internal const string ObservationCategory = "http://terminology.hl7.org/CodeSystem/observation-category";
    internal const string DataAbsentReason = "http://terminology.hl7.org/CodeSystem/data-absent-reason";
    internal const string LibraryType = "http://terminology.hl7.org/CodeSystem/library-type";
    internal const string Loinc = "http://loinc.org";

    /// <summary>Identifier system of results: how we recognise our own output.</summary>
    public string Result => @base + "/result";

    /// <summary>Identifier system of inputs; values are <c>{base}|{Type}|{id}|{version}</c>.</summary>
    public string Input => @base + "/input";

    /// <summary>Identifier system of patients and encounters on a server that does not hold them.</summary>
    public string Source => @base + "/source";

    /// <summary>Identifier system of our Device resources.</summary>
    public string Device => @base + "/device";

    /// <summary>Identifier system of documents; values are their SHA-256.</summary>
    public string Document => @base + "/document";

    /// <summary>Codes of derived values.</summary>
    public string DerivedValue => CodeSystem("derived-value");

    /// <summary>Codes of the values used.</summary>
    public string InputValue => CodeSystem("input-value");

    /// <summary>Codes of coded values: <c>kind.code</c>.</summary>
    public string CodedValue => CodeSystem("coded-value");

    /// <summary>Our category.</summary>
    public string Category => CodeSystem("category");

    /// <summary>Codes of flags.</summary>
    public string Flag => CodeSystem("flag");

    /// <summary>Codes of reasons for withholding.</summary>
    public string Withheld => CodeSystem("withheld");

    /// <summary>Codes of methods: a definition and its variant.</summary>
    public string Method => CodeSystem("method");

    /// <summary>Extension on Observation: a flag.</summary>
    public string FlagExtension => Structure("flag");

    /// <summary>Extension on a component: minutes from the anchor to the reading, negative before.</summary>
    public string GapMinutes => Structure("gap-minutes");

    /// <summary>Extension on a component: a constant that nobody measured.</summary>
    public string Assumed => Structure("assumed");

    /// <summary>Extension on Observation.method: <c>generic</c> or <c>site</c>.</summary>
    public string UncertaintyBasis => Structure("uncertainty-basis");

    /// <summary>Extension on Provenance.target: revision of the result.</summary>
    public string ResultRevision => Structure("result-revision");

    /// <summary>Extension on Provenance: our own id of it, a UUID.</summary>
    public string ProvenanceId => Structure("provenance-id");

    /// <summary>Extension on Provenance: SHA-256 of the Observation's content.</summary>
    public string ContentDigest => Structure("content-sha256");

    /// <summary>Extension on Provenance: a reading that only a gate looked at.</summary>
    public string GateEvidence => Structure("gate-evidence");

    /// <summary>Extension on Provenance: why a result was retracted.</summary>
    public string WithheldReason => Structure("withheld");

    /// <summary>Extension on Provenance.entity: version of the input.</summary>
    public string InputVersion => Structure("input-version");

    /// <summary>Extension on Provenance.entity: one value taken from the input (kind, part, value).</summary>
    public string ValueUsed => Structure("value-used");

    /// <summary>Canonical of a definition without its version.</summary>
    public string Definition(string key) => $"{@base}/Library/{key}";

    /// <summary>Canonical of the site policy without its version, which is the hash.</summary>
    public string Policy => @base + "/Library/policy";

    internal static Coding Ours(string system, string code, string display) => new(system, code, display);

    private string CodeSystem(string name) => $"{@base}/CodeSystem/{name}";

    private string Structure(string name) => $"{@base}/StructureDefinition/{name}";
}
