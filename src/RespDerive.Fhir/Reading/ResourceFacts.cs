using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>
/// What one version of one resource says, as sent: no rule has been applied, no reference looked up.
/// Every rule of reading runs on these facts and on nothing else.
/// </summary>
public sealed record ResourceFacts
{
    /// <summary>The resource.</summary>
    public required ResourceKey Key { get; init; }

    /// <summary>Base URL: of the Bundle entry's own address, else of the source; empty when unknown.</summary>
    public string Base { get; init; } = "";

    /// <summary>meta.versionId as sent, else the first 16 digits of the content digest.</summary>
    public required string Version { get; init; }

    /// <summary>Place in the total order of versions.</summary>
    public required VersionOrder Order { get; init; }

    /// <summary>When we got it.</summary>
    public required DateTimeOffset Arrived { get; init; }

    /// <summary>Reference of the patient it belongs to; null when it names none (devices never do).</summary>
    public string? Patient { get; init; }

    /// <summary>References of other resources it names, the patient's among them.</summary>
    public IReadOnlyList<string> References { get; init; } = [];

    /// <summary>Business identifiers.</summary>
    public IReadOnlyList<IdentifierFact> Identifiers { get; init; } = [];

    /// <summary>Contained resources by the reference under which this one names them.</summary>
    public IReadOnlyDictionary<string, TypeFacts> Contained { get; init; } = new Dictionary<string, TypeFacts>();

    /// <summary>What only this type of resource has.</summary>
    public required TypeFacts Content { get; init; }

    /// <summary>True for an Observation that names no patient: it still replaces the version before, and says nothing itself.</summary>
    public bool LacksPatient => Patient is null && Content is ObservationFacts;

    /// <summary>
    /// True when this version of the same resource is newer. Between two that carry neither version nor time of change,
    /// the one that came later is.
    /// </summary>
    public bool Supersedes(ResourceFacts before) =>
        (Order.IsUnordered && before.Order.IsUnordered) || Order.CompareTo(before.Order) > 0;
}

/// <summary>A business identifier.</summary>
public sealed record IdentifierFact(string System, string Value)
{
    /// <summary>The reference by which a logical reference names it.</summary>
    public string Reference => $"identifier:{System}|{Value}";
}

/// <summary>A code and its system; the edition of the system (SNOMED CT) carries no meaning here.</summary>
public sealed record CodeFact(string System, string Code);

/// <summary>What one type of resource has beyond the common facts.</summary>
public abstract record TypeFacts;

/// <summary>An Observation.</summary>
public sealed record ObservationFacts : TypeFacts
{
    /// <summary>Status as sent; null when absent or not a string.</summary>
    public string? Status { get; init; }

    /// <summary>All codes of all categories.</summary>
    public IReadOnlyList<CodeFact> Categories { get; init; } = [];

    /// <summary>Code, value and reason of absence of the Observation itself.</summary>
    public required PartFacts Own { get; init; }

    /// <summary>Components, in order.</summary>
    public IReadOnlyList<PartFacts> Components { get; init; } = [];

    /// <summary>Effective time; null when absent or of another form than a time or a period.</summary>
    public EffectiveFact? Effective { get; init; }

    /// <summary>issued, as sent.</summary>
    public string? Issued { get; init; }

    /// <summary>Reference of the specimen.</summary>
    public string? Specimen { get; init; }

    /// <summary>Reference of the Device or DeviceMetric.</summary>
    public string? Device { get; init; }

    /// <summary>Reference of the encounter.</summary>
    public string? Encounter { get; init; }

    /// <summary>References of the members of a panel.</summary>
    public IReadOnlyList<string> Members { get; init; } = [];
}

/// <summary>A code with a value: an Observation's own or a component's.</summary>
/// <param name="Codes">Codes, in order.</param>
/// <param name="Value">The value; null when there is none.</param>
/// <param name="Absent">Code or text of dataAbsentReason; null when there is none.</param>
public sealed record PartFacts(IReadOnlyList<CodeFact> Codes, ValueFact? Value, string? Absent);

/// <summary>A value as sent.</summary>
public abstract record ValueFact;

/// <summary>A Quantity.</summary>
/// <param name="Number">The number; null when absent.</param>
/// <param name="Exact">False when it carries a comparator or the number cannot be read.</param>
/// <param name="Unit">Unit for people.</param>
/// <param name="System">System of the unit code.</param>
/// <param name="Code">Unit code.</param>
public sealed record QuantityFact(decimal? Number, bool Exact, string? Unit, string? System, string? Code) : ValueFact;

/// <summary>A CodeableConcept, string or boolean.</summary>
/// <param name="Codes">Codes, in order; none for a string.</param>
/// <param name="Text">Text; null when absent.</param>
public sealed record ConceptFact(IReadOnlyList<CodeFact> Codes, string? Text) : ValueFact;

/// <summary>A value that is not one number and not one concept: Range, Ratio, SampledData, several values…</summary>
/// <param name="Form">Name of the element, for people.</param>
public sealed record OtherValueFact(string Form) : ValueFact;

/// <summary>A time, or a period with its ends, each as sent.</summary>
public sealed record EffectiveFact(string? At, string? Start, string? End)
{
    /// <summary>True for a period.</summary>
    public bool IsPeriod => At is null;
}

/// <summary>A Specimen.</summary>
/// <param name="Status">Status as sent.</param>
/// <param name="Types">Codes of its type.</param>
/// <param name="Collected">Time of collection.</param>
public sealed record SpecimenFacts(string? Status, IReadOnlyList<CodeFact> Types, EffectiveFact? Collected) : TypeFacts;

/// <summary>A Patient.</summary>
/// <param name="Gender">Administrative gender as sent.</param>
/// <param name="SexForClinicalUse">Code of the extension for clinical use; null when absent.</param>
/// <param name="BirthSex">Code of the birth-sex extension; null when absent.</param>
/// <param name="BirthDate">Birth date as sent.</param>
/// <param name="ReplacedBy">Reference of the Patient that replaces this one after a merge.</param>
public sealed record PatientFacts(string? Gender, string? SexForClinicalUse, string? BirthSex, string? BirthDate, string? ReplacedBy) : TypeFacts;

/// <summary>A Device.</summary>
public sealed record DeviceFacts(string? Status) : TypeFacts;

/// <summary>A DeviceMetric: one value that a device sets, measures or calculates.</summary>
/// <param name="Category">measurement, setting, calculation or unspecified.</param>
/// <param name="Types">Codes of the metric.</param>
/// <param name="Source">Reference of the Device.</param>
public sealed record DeviceMetricFacts(string? Category, IReadOnlyList<CodeFact> Types, string? Source) : TypeFacts;

/// <summary>An Encounter.</summary>
/// <param name="Status">Status as sent.</param>
/// <param name="Class">Class.</param>
/// <param name="Start">Start of its period.</param>
/// <param name="End">End of its period.</param>
public sealed record EncounterFacts(string? Status, CodeFact? Class, string? Start, string? End) : TypeFacts;

/// <summary>A DiagnosticReport.</summary>
/// <param name="Status">Status as sent.</param>
/// <param name="Results">References of its results.</param>
/// <param name="Specimens">References of its specimens.</param>
public sealed record ReportFacts(string? Status, IReadOnlyList<string> Results, IReadOnlyList<string> Specimens) : TypeFacts;

/// <summary>A Procedure.</summary>
/// <param name="Status">Status as sent.</param>
/// <param name="Codes">Codes of the procedure and of its category.</param>
/// <param name="Performed">When it was performed.</param>
/// <param name="Encounter">Reference of the encounter.</param>
public sealed record ProcedureFacts(string? Status, IReadOnlyList<CodeFact> Codes, EffectiveFact? Performed, string? Encounter) : TypeFacts;
