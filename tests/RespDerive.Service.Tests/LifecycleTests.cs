using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>A published result follows its inputs; every state is a version of its own with its own Provenance.</summary>
public sealed class LifecycleTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Corrected_input_makes_a_corrected_version()
    {
        await using var bench = await PublishedAsync();
        var first = await RatioAsync(bench, _ => true);
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 100, Drawn, status: "corrected"));
        var second = await RatioAsync(bench, one => one.Value() == 250);
        Assert.Equal("corrected", second.Status());
        Assert.Equal(first["id"]!.ToString(), second["id"]!.ToString());
        Assert.Equal(first.ResultId(), second.ResultId());
        Assert.Contains("Observation/gas/_history/2", second.DerivedFrom());
        await AssertEditionsAsync(bench, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task Late_setting_amends_the_value()
    {
        await using var bench = await PublishedAsync();
        await RatioAsync(bench, one => one.Value() == 200);
        await bench.Fhir.PutAsync(Some.FiO2("late", "p", 50, Drawn.AddMinutes(-25)));
        var amended = await RatioAsync(bench, one => one.Value() == 160);
        Assert.Equal("amended", amended.Status());
        Assert.Equal(["Observation/gas/_history/1", "Observation/late/_history/1"], amended.DerivedFrom());
        await AssertEditionsAsync(bench, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task Withdrawn_input_retracts_the_result_and_it_returns_with_the_input()
    {
        await using var bench = await PublishedAsync();
        var published = await RatioAsync(bench, _ => true);
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn, status: "entered-in-error"));
        var retracted = await RatioAsync(bench, one => one.Status() == "entered-in-error");
        Assert.Null(retracted["valueQuantity"]);
        Assert.Null(retracted["component"]);
        Assert.Equal("error", retracted["dataAbsentReason"]!["coding"]![0]!["code"]!.ToString());
        Assert.Equal(published.DerivedFrom(), retracted.DerivedFrom());
        Assert.Equal(published.ResultId(), retracted.ResultId());
        await AssertEditionsAsync(bench, "CREATE", "NULLIFY");

        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        var again = await RatioAsync(bench, one => one.Status() != "entered-in-error");
        Assert.Equal("amended", again.Status());
        Assert.Equal(200, again.Value());
        Assert.Null(again["dataAbsentReason"]);
        await AssertEditionsAsync(bench, "CREATE", "NULLIFY", "UPDATE");
    }

    [Fact]
    public async Task Preliminary_input_gives_a_preliminary_result_that_becomes_final()
    {
        await using var bench = await Bench.StartAsync();
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn, status: "preliminary"));
        await RatioAsync(bench, one => one.Status() == "preliminary" && one.Value() == 200);
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        await RatioAsync(bench, one => one.Status() == "final" && one.Value() == 200);
        await AssertEditionsAsync(bench, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task Same_content_sent_again_changes_nothing()
    {
        await using var bench = await PublishedAsync();
        await RatioAsync(bench, _ => true);
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Observation("pulse", "p", "8867-4", 88, "/min", Drawn));
        await Until.True(() => bench.Store.Counts().Received == 5, "both taken");
        await bench.IdleAsync();
        Assert.Equal(2, (await bench.Fhir.ProvenancesAsync(await RatioAsync(bench, _ => true))).Count);
    }

    private static async Task<Bench> PublishedAsync()
    {
        var bench = await Bench.StartAsync();
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        await RatioAsync(bench, one => one.Value() == 200 && one.Status() == "final");
        return bench;
    }

    private static Task<JsonObject> RatioAsync(Bench bench, Func<JsonObject, bool> condition) => bench.ResultAsync("p", "pf-ratio", condition);

    /// <summary>One version and one Provenance for each edition; each later Provenance names the version before as revision.</summary>
    private static async Task AssertEditionsAsync(Bench bench, params string[] activities)
    {
        await bench.IdleAsync();
        var now = await RatioAsync(bench, _ => true);
        Assert.Equal(activities.Length, int.Parse(now.Version(), System.Globalization.CultureInfo.InvariantCulture));
        var provenances = (await bench.Fhir.ProvenancesAsync(now)).OrderBy(Revision).ToArray();
        Assert.Equal(activities, provenances.Select(one => one.Activity()));
        for (var i = 0; i < provenances.Length; i++)
        {
            Assert.Equal(i + 1, Revision(provenances[i]));
            Assert.Equal(i == 0 ? [] : [$"Observation/{now["id"]}/_history/{i}"], provenances[i].Entities("revision"));
        }

        static int Revision(JsonObject provenance) => (int)provenance["target"]![0]!["extension"]![0]!["valuePositiveInt"]!;
    }
}
