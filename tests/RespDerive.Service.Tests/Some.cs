using System.Globalization;
using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>Invented resources. What names a person carries the mark, so that it can be looked for where it must not be.</summary>
internal static class Some
{
    /// <summary>In every name, identifier and free text.</summary>
    public const string Mark = "Qyzzix";

    public static string Time(DateTimeOffset at) => at.ToString("yyyy-MM-dd'T'HH:mm:ss.fffzzz", CultureInfo.InvariantCulture);

    public static JsonObject Patient(string id) => new()
    {
        ["resourceType"] = "Patient",
        ["id"] = id,
        ["identifier"] = new JsonArray(new JsonObject { ["system"] = "urn:ward:mrn", ["value"] = $"{Mark}-{id}" }),
        ["name"] = new JsonArray(new JsonObject { ["family"] = Mark, ["given"] = new JsonArray("Alder") }),
        ["gender"] = "male",
        ["birthDate"] = "1971-02-03",
    };

    public static JsonObject Specimen(string id, string patient, DateTimeOffset collected) => new()
    {
        ["resourceType"] = "Specimen",
        ["id"] = id,
        ["type"] = Concept("http://snomed.info/sct", "122552005"),
        ["subject"] = new JsonObject { ["reference"] = $"Patient/{patient}" },
        ["collection"] = new JsonObject { ["collectedDateTime"] = Time(collected) },
    };

    /// <summary>Arterial oxygen partial pressure.</summary>
    public static JsonObject Gas(string id, string patient, double value, DateTimeOffset at, string? specimen = null, string status = "final")
    {
        var gas = Observation(id, patient, "2703-7", value, "mm[Hg]", at, status);
        if (specimen is not null)
        {
            gas["specimen"] = new JsonObject { ["reference"] = $"Specimen/{specimen}" };
        }

        return gas;
    }

    /// <summary>Inspired oxygen fraction, as sent by a device or a person: in per cent.</summary>
    public static JsonObject FiO2(string id, string patient, double percent, DateTimeOffset at, string status = "final") =>
        Observation(id, patient, "3150-0", percent, "%", at, status);

    public static JsonObject Observation(string id, string patient, string loinc, double value, string unit, DateTimeOffset at, string status = "final") => new()
    {
        ["resourceType"] = "Observation",
        ["id"] = id,
        ["status"] = status,
        ["code"] = Concept("http://loinc.org", loinc),
        ["subject"] = new JsonObject { ["reference"] = $"Patient/{patient}", ["display"] = Mark },
        ["effectiveDateTime"] = Time(at),
        ["valueQuantity"] = new JsonObject { ["value"] = value, ["unit"] = unit, ["system"] = "http://unitsofmeasure.org", ["code"] = unit },
        ["note"] = new JsonArray(new JsonObject { ["text"] = $"written about {Mark}" }),
    };

    private static JsonObject Concept(string system, string code) =>
        new() { ["coding"] = new JsonArray(new JsonObject { ["system"] = system, ["code"] = code }) };
}
