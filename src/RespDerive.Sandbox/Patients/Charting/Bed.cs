using System.Globalization;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>One bed of Ward Alder: ids, and the resources its systems write.</summary>
internal sealed class Bed(int number, Profile profile)
{
    private const string OwnCodes = "http://ward-alder.example/codes";

    public string Name { get; } = $"alder-{number}";
    public string PatientName => $"{profile.GivenName} Sandbox{(number > Profiles.All.Length ? $" {number}" : "")}";
    public string Patient => $"Patient/{Name}";
    public string Ventilator => $"Device/{Name}-ventilator";
    public string Oximeter => $"Device/{Name}-oximeter";
    public string PeepMetric => $"DeviceMetric/{Name}-peep";

    /// <summary>What exists before the first reading, in the order in which references need it.</summary>
    public IEnumerable<JsonObject> Standing(DateTimeOffset admitted, double measuredHeight)
    {
        yield return Resource("Patient", Name, new JsonObject
        {
            ["identifier"] = new JsonArray(new JsonObject { ["system"] = "http://ward-alder.example/patients", ["value"] = Name }),
            ["active"] = true,
            ["name"] = new JsonArray(new JsonObject { ["text"] = PatientName, ["family"] = "Sandbox", ["given"] = new JsonArray(profile.GivenName) }),
            ["gender"] = profile.Gender,
            ["birthDate"] = profile.BirthDate,
        });
        yield return Resource("Encounter", Name, new JsonObject
        {
            ["status"] = "in-progress",
            ["class"] = new JsonObject { ["system"] = "http://terminology.hl7.org/CodeSystem/v3-ActCode", ["code"] = "IMP" },
            ["subject"] = Reference(Patient),
            ["period"] = new JsonObject { ["start"] = Time(admitted) },
            ["location"] = new JsonArray(new JsonObject { ["location"] = new JsonObject { ["display"] = $"Ward Alder, bed {number}" } }),
        });
        yield return Device(Ventilator, "Ventilator");
        yield return Device(Oximeter, "Pulse oximeter");
        yield return Resource("DeviceMetric", $"{Name}-peep", new JsonObject
        {
            ["type"] = Loinc(Codes.Peep),
            ["source"] = Reference(Ventilator),
            ["operationalStatus"] = "on",
            ["category"] = "measurement",
        });
        var height = Observation($"{Name}-height", Codes.Height, admitted, profile.Units.Height(measuredHeight));
        height["category"] = Category("vital-signs");
        yield return height;
    }

    public JsonObject Observation(string id, Code code, DateTimeOffset at, JsonObject? quantity, string? device = null)
    {
        var body = new JsonObject
        {
            ["status"] = "final",
            ["code"] = Loinc(code),
            ["subject"] = Reference(Patient),
            ["encounter"] = Reference($"Encounter/{Name}"),
            ["effectiveDateTime"] = Time(at),
        };
        if (quantity is not null)
        {
            body["valueQuantity"] = quantity;
        }
        if (device is not null)
        {
            body["device"] = Reference(device);
        }
        return Resource("Observation", id, body);
    }

    public JsonObject Mode(string id, DateTimeOffset at, string code)
    {
        var observation = Observation(id, Codes.Mode, at, null, Ventilator);
        observation["valueCodeableConcept"] = Own(code, code.Replace('-', ' '));
        return observation;
    }

    public JsonObject SpO2(string id, DateTimeOffset at, double fraction)
    {
        var observation = Observation(id, Codes.SpO2, at, Units.Quantity(fraction * 100, 0, "%"), Oximeter);
        // The R4 vital-signs profile for oxygen saturation asks for both codes.
        observation["code"]!["coding"]!.AsArray().Add(Coding(Codes.SaO2));
        observation["category"] = Category("vital-signs");
        return observation;
    }

    public JsonObject Specimen(string id, DateTimeOffset collected, bool arterial) => Resource("Specimen", id, new JsonObject
    {
        ["type"] = new JsonObject
        {
            ["coding"] = new JsonArray(new JsonObject { ["system"] = "http://terminology.hl7.org/CodeSystem/v2-0487", ["code"] = arterial ? "BLDA" : "BLDV" }),
        },
        ["subject"] = Reference(Patient),
        ["collection"] = new JsonObject { ["collectedDateTime"] = Time(collected) },
    });

    public JsonObject Result(string id, Code code, DateTimeOffset at, DateTimeOffset issued, JsonObject quantity, string specimen)
    {
        var observation = Observation(id, code, at, quantity);
        observation["category"] = Category("laboratory");
        observation["issued"] = Time(issued);
        observation["specimen"] = Reference($"Specimen/{specimen}");
        return observation;
    }

    /// <summary>An Observation without a value that holds the results together.</summary>
    public JsonObject Panel(string id, DateTimeOffset at, IEnumerable<string> members, string specimen)
    {
        var observation = Observation(id, Codes.PaO2, at, null);
        observation["code"] = Own("blood-gas-panel", "Blood gas panel");
        observation["category"] = Category("laboratory");
        observation["specimen"] = Reference($"Specimen/{specimen}");
        observation["hasMember"] = References(members);
        return observation;
    }

    public JsonObject Report(string id, DateTimeOffset at, DateTimeOffset issued, IEnumerable<string> results, string specimen) => Resource("DiagnosticReport", id, new JsonObject
    {
        ["status"] = "final",
        ["code"] = Own("blood-gas-panel", "Blood gas panel"),
        ["subject"] = Reference(Patient),
        ["encounter"] = Reference($"Encounter/{Name}"),
        ["effectiveDateTime"] = Time(at),
        ["issued"] = Time(issued),
        ["specimen"] = new JsonArray(Reference($"Specimen/{specimen}")),
        ["result"] = References(results),
    });

    private JsonObject Device(string reference, string name) => Resource("Device", reference["Device/".Length..], new JsonObject
    {
        ["status"] = "active",
        ["deviceName"] = new JsonArray(new JsonObject { ["name"] = $"{name} {number}, Ward Alder", ["type"] = "user-friendly-name" }),
        ["patient"] = Reference(Patient),
    });

    private static JsonObject Resource(string type, string id, JsonObject body)
    {
        body.Insert(0, "resourceType", type);
        body.Insert(1, "id", id);
        return body;
    }

    private static JsonObject Loinc(Code code) => new() { ["coding"] = new JsonArray(Coding(code)), ["text"] = code.Name };

    private static JsonObject Coding(Code code) => new() { ["system"] = "http://loinc.org", ["code"] = code.Loinc, ["display"] = code.Name };

    private static JsonObject Own(string code, string text) =>
        new() { ["coding"] = new JsonArray(new JsonObject { ["system"] = OwnCodes, ["code"] = code }), ["text"] = text };

    private static JsonArray Category(string code) =>
        [new JsonObject { ["coding"] = new JsonArray(new JsonObject { ["system"] = "http://terminology.hl7.org/CodeSystem/observation-category", ["code"] = code }) }];

    private static JsonObject Reference(string reference) => new() { ["reference"] = reference };

    private static JsonArray References(IEnumerable<string> observations) => [.. observations.Select(id => Reference($"Observation/{id}"))];

    private static string Time(DateTimeOffset at) => at.ToString("yyyy-MM-dd'T'HH:mm:sszzz", CultureInfo.InvariantCulture);
}
