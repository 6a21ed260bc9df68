using System.Globalization;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>Collects the messages of one bed and gives each resource its id.</summary>
internal sealed class Chart(Bed bed)
{
    private readonly Dictionary<string, int> _numbers = [];

    public List<ScenarioEvent> Events { get; } = [];

    public Bed Bed => bed;

    public string NextId(string kind)
    {
        var number = _numbers.GetValueOrDefault(kind) + 1;
        _numbers[kind] = number;
        return $"{bed.Name}-{kind}-{number.ToString("D4", CultureInfo.InvariantCulture)}";
    }

    public void File(WardEventKind kind, DateTimeOffset at, DateTimeOffset filed, JsonObject resource, string summary) =>
        Events.Add(new ScenarioEvent(at, filed, kind, bed.Patient, bed.PatientName, resource["resourceType"]!.GetValue<string>(), resource["id"]!.GetValue<string>(), summary, resource));

    public void File(WardEventKind kind, DateTimeOffset at, DateTimeOffset filed, Code code, JsonObject observation, string note = "")
    {
        var quantity = observation["valueQuantity"];
        var unit = quantity?["unit"]?.GetValue<string>() is { } text and not "1" ? " " + text : "";
        File(kind, at, filed, observation, quantity is null ? code.Short : $"{code.Short} {quantity["value"]!.ToJsonString()}{unit}{note}");
    }

    /// <summary>The same resource with another value: status corrected.</summary>
    public void Correct(DateTimeOffset at, DateTimeOffset filed, Code code, JsonObject before, JsonObject quantity)
    {
        var corrected = (JsonObject)before.DeepClone();
        corrected["status"] = "corrected";
        corrected["valueQuantity"] = quantity;
        File(WardEventKind.Correction, at, filed, code, corrected, " (corrected)");
    }

    /// <summary>The same resource: status entered-in-error.</summary>
    public void Withdraw(DateTimeOffset at, DateTimeOffset filed, Code code, JsonObject before)
    {
        var withdrawn = (JsonObject)before.DeepClone();
        withdrawn["status"] = "entered-in-error";
        File(WardEventKind.Withdrawal, at, filed, code, withdrawn, " (withdrawn)");
    }
}
