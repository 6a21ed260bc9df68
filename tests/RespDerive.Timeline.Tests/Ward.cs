using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline.Tests;

/// <summary>Builds readings of one invented patient, times in minutes from a fixed morning.</summary>
internal static class Ward
{
    public static readonly DateTimeOffset Morning = new(2026, 3, 2, 8, 0, 0, TimeSpan.Zero);

    public static readonly Policy SeaLevel = new() { PressureMmHg = 760, Hash = "policy-a" };

    public static Reading Read(string id, Kind kind, double value, double minute, string version = "1") => new()
    {
        Id = new ReadingId(new ResourceKey("ehr", "Observation", id), ""),
        Version = version,
        Kind = kind,
        Value = value,
        Given = (decimal)value,
        GivenUnit = kind.Unit,
        At = Morning.AddMinutes(minute),
        AtText = Morning.AddMinutes(minute).ToString("yyyy-MM-ddTHH:mm:ssK", System.Globalization.CultureInfo.InvariantCulture),
        Patient = "Patient/one",
    };

    public static Reading Refused(string id, Kind kind, string code, double minute) => Read(id, kind, 0, minute) with { Refused = code, Value = double.NaN };

    public static Person Adult(string sex = "male") => new(new ResourceKey("ehr", "Patient", "one"), "1", sex, "1970-05-01");

    public static Evaluator Evaluator(params Policy[] policies) => new(Catalogue.Shipped, new PolicyBook(policies.Length == 0 ? [SeaLevel] : policies), "test");

    public static IReadOnlyList<Outcome> Evaluate(string definition, params Reading[] readings) => Evaluate(definition, null, SeaLevel, readings);

    public static IReadOnlyList<Outcome> Evaluate(string definition, Person? person, Policy policy, params Reading[] readings) =>
        Evaluator(policy).Evaluate(Catalogue.Shipped.Find(definition)!, new Slice(readings, person), DateTimeOffset.MinValue, DateTimeOffset.MaxValue, explain: true);
}
