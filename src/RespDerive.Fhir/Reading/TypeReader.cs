using System.Text.Json;

namespace RespDerive.Fhir;

/// <summary>What each type of resource has beyond the common facts.</summary>
internal static class TypeReader
{
    private const string ClinicalUse = "http://hl7.org/fhir/StructureDefinition/patient-sexParameterForClinicalUse";
    private const string BirthSex = "http://hl7.org/fhir/us/core/StructureDefinition/us-core-birthsex";

    public static bool IsRead(string type) => type is "Observation" or "Patient" or "Specimen" or "Device" or "DeviceMetric"
        or "Encounter" or "DiagnosticReport" or "Procedure";

    public static TypeFacts Read(string type, JsonElement root, References references) => type switch
    {
        "Observation" => ObservationReader.Read(root, references),
        "Patient" => Patient(root, references),
        "Specimen" => new SpecimenFacts(root.Text("status"), root.Codes("type"), Effective(root.Get("collection") ?? default, "collected")),
        "Device" => new DeviceFacts(root.Text("status")),
        "DeviceMetric" => new DeviceMetricFacts(root.Text("category"), root.Codes("type"), references.Key(root.Get("source"))),
        "Encounter" => Encounter(root),
        "DiagnosticReport" => new ReportFacts(root.Text("status"), references.Keys(root.Each("result")), references.Keys(root.Each("specimen"))),
        _ => new ProcedureFacts(root.Text("status"), [.. root.Codes("code"), .. root.Codes("category")], Effective(root, "performed"),
            references.Key(root.Get("encounter"))),
    };

    /// <summary>Codes of a CodeableConcept, or of all of a list, in order.</summary>
    public static IReadOnlyList<CodeFact> Codes(this JsonElement element, string name) =>
        [.. element.Each(name).SelectMany(concept => concept.Each("coding")).Select(Code).OfType<CodeFact>()];

    /// <summary>A time or period by the stem of its choice element.</summary>
    public static EffectiveFact? Effective(JsonElement element, string stem)
    {
        if ((element.Text(stem + "DateTime") ?? element.Text(stem + "Instant")) is { } at)
        {
            return new(at, null, null);
        }

        return element.Get(stem + "Period") is { ValueKind: JsonValueKind.Object } period
            ? new(null, period.Text("start"), period.Text("end")) : null;
    }

    private static CodeFact? Code(JsonElement coding) =>
        coding.Text("code") is { } code ? new(coding.Text("system")?.Trim() ?? "", code.Trim()) : null;

    private static EncounterFacts Encounter(JsonElement root)
    {
        var period = root.Get("period") ?? default;
        return new(root.Text("status"), root.Get("class") is { } kind ? Code(kind) : null, period.Text("start"), period.Text("end"));
    }

    private static PatientFacts Patient(JsonElement root, References references)
    {
        string? clinical = null, birth = null;
        foreach (var extension in root.Each("extension"))
        {
            switch (extension.Text("url"))
            {
                case ClinicalUse:
                    clinical ??= extension.Each("extension").Where(part => part.Text("url") == "value")
                        .SelectMany(part => part.Codes("valueCodeableConcept")).FirstOrDefault()?.Code;
                    break;
                case BirthSex:
                    birth ??= extension.Text("valueCode");
                    break;
            }
        }

        var replaced = root.Each("link").Where(link => link.Text("type") == "replaced-by").Select(link => link.Get("other")).FirstOrDefault();
        return new(root.Text("gender"), clinical, birth, root.Text("birthDate"), references.Key(replaced));
    }
}
