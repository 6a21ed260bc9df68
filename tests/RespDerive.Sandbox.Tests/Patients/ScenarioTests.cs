using System.Globalization;
using System.Text.Json.Nodes;
using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;
using RespDerive.Sandbox.Patients;

namespace RespDerive.Sandbox.Tests.Patients;

public sealed class ScenarioTests
{
    private static readonly DateTimeOffset s_from = new(2026, 1, 2, 6, 0, 0, TimeSpan.FromHours(1));
    private static readonly Scenario s_day = Scenario.Play(7, s_from, TimeSpan.FromHours(10));

    [Fact]
    public void The_same_seed_gives_the_same_ward()
    {
        static string[] Lines(Scenario s) => [.. s.Events.Select(e => $"{e.FilingTime:O} {e.Json.ToJsonString()}")];
        var again = Scenario.Play(7, s_from, TimeSpan.FromHours(10));
        Assert.Equal(Lines(s_day), Lines(again));
        Assert.Equal(s_day.Truths, again.Truths);
        Assert.NotEqual(Lines(s_day), Lines(Scenario.Play(8, s_from, TimeSpan.FromHours(10))));
    }

    [Fact]
    public void A_longer_scenario_begins_like_a_shorter_one()
    {
        var shorter = Scenario.Play(7, s_from, TimeSpan.FromHours(4));
        Assert.Equal(shorter.Events.Select(e => e.Json.ToJsonString()), s_day.Events.Take(shorter.Events.Count).Select(e => e.Json.ToJsonString()));
    }

    // The R4 model in its strictest reading (Hl7.Fhir.R4): cardinalities, required bindings, formats.
    [Fact]
    public void Every_resource_is_valid_R4()
    {
        foreach (var e in s_day.Events)
        {
            FhirJsonDeserializer.STRICT.TryDeserializeResource(e.Json.ToJsonString(), out _, out var problems);
            Assert.True(!problems.Any(), $"{e.Id}: {problems.FirstOrDefault()?.Message}");
        }
    }

    [Fact]
    public void Nothing_is_filed_before_it_happened_or_before_what_it_refers_to()
    {
        var seen = new HashSet<string>();
        var last = DateTimeOffset.MinValue;
        foreach (var e in s_day.Events)
        {
            Assert.True(e.EventTime <= e.FilingTime && e.FilingTime >= last && e.FilingTime <= s_from.AddHours(10));
            last = e.FilingTime;
            seen.Add($"{e.Type}/{e.Id}");
            Assert.All(References(e.Json), r => Assert.Contains(r, seen));
        }
    }

    [Fact]
    public void Everything_that_goes_wrong_on_a_ward_happens()
    {
        Assert.All(Enum.GetValues<WardEventKind>(), kind => Assert.Contains(s_day.Events, e => e.Kind == kind));
        Assert.Contains(s_day.Events, e => e.Json["type"]?["coding"]?[0]?["code"]?.GetValue<string>() == "BLDV");
        Assert.Contains(s_day.Events, e => Value(e.Json) is { Code: "%", Number: < 1 });
        Assert.Contains(s_day.Events, e => e.Json["status"]?.GetValue<string>() == "corrected");
        Assert.Contains(s_day.Events, e => e.Type == "DiagnosticReport");
        Assert.Contains(s_day.Events, e => e.Json.ContainsKey("hasMember"));
    }

    [Fact]
    public void Units_differ_between_beds()
    {
        string[] UnitsOf(string loinc) => [.. s_day.Events.Where(e => e.Kind != WardEventKind.Setting && Code(e.Json) == loinc).Select(e => Value(e.Json)!.Value.Code).Distinct().Order(StringComparer.Ordinal)];
        Assert.Equal(["kPa", "mm[Hg]"], UnitsOf("2703-7"));
        Assert.Equal(["cm[H2O]", "mbar"], UnitsOf("76259-1"));
        Assert.Equal(["L", "mL"], UnitsOf("76007-4"));
        Assert.Equal(["cm", "m"], UnitsOf("8302-2"));
        Assert.Equal(["1"], UnitsOf("71835-3"));
        Assert.Equal(["%"], UnitsOf("19996-8"));
    }

    // Bounds wide enough for critical illness, narrow enough to catch a wrong unit or formula (common practice, no single source).
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void True_values_are_plausible_for_a_ventilated_patient(int seed)
    {
        var scenario = Scenario.Play(seed, s_from, TimeSpan.FromHours(14));
        Assert.All(scenario.Truths, t =>
        {
            Assert.InRange(t.TidalVolume, 0.25, 0.65);
            Assert.InRange(t.Plateau, 10, 33);
            Assert.InRange(t.Peak, 10, 45);
            Assert.InRange(t.Mean, 5, 22);
            Assert.InRange(t.PaO2, 45, 160);
            Assert.InRange(t.PaCO2, 30, 75);
            Assert.InRange(t.Ph, 7.20, 7.55);
            Assert.InRange(t.SaO2, 0.84, 1);
            Assert.InRange(t.FiO2, 0.25, 1);
            Assert.InRange(t.AaGradient, 20, 600);
        });
        double First(int bed, Func<Truth, double> value) => value(scenario.Truths.First(t => t.Patient == $"Patient/alder-{bed}" && t.At > s_from.AddMinutes(30)));
        Assert.InRange(First(1, t => t.PfRatio), 80, 170);
        Assert.InRange(First(1, t => t.Compliance), 25, 36);
        Assert.True(First(2, t => t.IntrinsicPeep) > 2.5 && First(1, t => t.IntrinsicPeep) < 0.5);
        var last = scenario.Truths.Last(t => t.Patient == "Patient/alder-3");
        Assert.True(last.PfRatio > First(3, t => t.PfRatio) + 60 && !last.Passive);
    }

    private static IEnumerable<string> References(JsonNode? node) => node switch
    {
        JsonObject o => o.SelectMany(p => p.Key == "reference" ? [p.Value!.GetValue<string>()] : References(p.Value)),
        JsonArray a => a.SelectMany(References),
        _ => [],
    };

    internal static string? Code(JsonObject resource) => resource["code"]?["coding"]?[0]?["code"]?.GetValue<string>();

    internal static (double Number, string Code)? Value(JsonObject resource) => resource["valueQuantity"] is { } q
        ? (double.Parse(q["value"]!.ToJsonString(), CultureInfo.InvariantCulture), q["code"]!.GetValue<string>())
        : null;
}
