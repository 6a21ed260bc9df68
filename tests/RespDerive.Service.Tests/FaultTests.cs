using System.Globalization;
using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>Whatever goes wrong between us and the server: in the end one current result per identifier and one Provenance per edition.</summary>
public sealed class FaultTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Response_lost_after_the_commit_does_not_double()
    {
        await using var bench = await SilentAsync();
        bench.Sandbox.Faults.LoseNextResponses(1);
        await GasAsync(bench, 80);
        await AssertOneAsync(bench, 200, editions: 1);

        bench.Sandbox.Faults.LoseNextResponses(1);
        await GasAsync(bench, 100);
        await AssertOneAsync(bench, 250, editions: 2);
        Assert.Contains(bench.Sandbox.Journal.Entries, entry => entry.Status == 0);
    }

    [Fact]
    public async Task Response_lost_while_searches_lag_does_not_double()
    {
        await using var bench = await SilentAsync();
        bench.Sandbox.Faults.SearchStaleness = TimeSpan.FromSeconds(3);
        bench.Sandbox.Faults.LoseNextResponses(1);
        await GasAsync(bench, 80);
        await Until.True(() => bench.Store.Counts() is { Results: 1, Pending: 0 }, "delivery");
        bench.Sandbox.Faults.Clear();
        await AssertOneAsync(bench, 200, editions: 1);
    }

    [Fact]
    public async Task Burst_of_server_errors_only_delays()
    {
        await using var bench = await SilentAsync();
        bench.Sandbox.Faults.FailNext(6, 503, "POST");
        await GasAsync(bench, 80);
        await AssertOneAsync(bench, 200, editions: 1);
    }

    [Fact]
    public async Task Throttled_writes_come_no_sooner_than_the_server_asks()
    {
        await using var bench = await SilentAsync();
        bench.Sandbox.Faults.ThrottleNext(1, TimeSpan.FromSeconds(2), "POST");
        await GasAsync(bench, 80);
        await AssertOneAsync(bench, 200, editions: 1);
        var refused = bench.Sandbox.Journal.Entries.Single(entry => entry.Status == 429);
        var next = bench.Sandbox.Journal.Entries.First(entry => entry.At > refused.At && entry is { Method: "POST", Type: "Observation" });
        Assert.True(next.At - refused.At >= TimeSpan.FromSeconds(2), $"{next.At - refused.At}");
    }

    [Fact]
    public async Task Conditional_create_that_races_leaves_one_current_result()
    {
        await using var bench = await PublishedByPollAsync();
        // The store is lost, so that everything is created again, on a server that overlooks what it has.
        bench.Sandbox.Faults.RaceNextConditionalCreates(20);
        await WithoutStoreAsync(bench);
        Assert.Equal(2, (await bench.Fhir.ResultsAsync("p")).Count);
        await AssertOneAsync(bench, 200);

        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 100, Drawn));
        await AssertOneAsync(bench, 250);
    }

    [Fact]
    public async Task Lost_store_takes_up_what_the_server_has()
    {
        await using var bench = await PublishedByPollAsync();
        var before = await AssertOneAsync(bench, 200, editions: 1);
        await WithoutStoreAsync(bench);
        Assert.Equal(before["id"]!.ToString(), (await AssertOneAsync(bench, 200, editions: 2))["id"]!.ToString());
    }

    private static async Task<Bench> PublishedByPollAsync()
    {
        var bench = await Bench.StartAsync(Bench.Polling);
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        await AssertOneAsync(bench, 200, editions: 1);
        return bench;
    }

    private static async Task WithoutStoreAsync(Bench bench)
    {
        await bench.StopServiceAsync();
        bench.ForgetStore();
        await bench.StartServiceAsync();
        await Until.True(() => bench.Store.Counts() is { Results: 1, Pending: 0 }, "everything anew");
    }

    /// <summary>The Device is there already; what comes in is told by hand, so that faults meet our own writes only.</summary>
    private static async Task<Bench> SilentAsync()
    {
        var bench = await Bench.StartAsync(Bench.Silent);
        await NotifyAsync(bench, Some.Patient("p"));
        await NotifyAsync(bench, Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await NotifyAsync(bench, Some.Gas("first", "p", 60, Drawn.AddMinutes(-45)));
        await Until.True(async () => (await bench.Fhir.ResultsAsync("p", "pf-ratio")).Count == 1, "the first result");
        await bench.IdleAsync();
        var first = Some.Gas("first", "p", 60, Drawn.AddMinutes(-45), status: "entered-in-error");
        await NotifyAsync(bench, first);
        await Until.True(async () => (await bench.Fhir.ResultsAsync("p")).All(one => one.Status() == "entered-in-error"), "its retraction");
        await bench.IdleAsync();
        return bench;
    }

    private static Task GasAsync(Bench bench, double value) => NotifyAsync(bench, Some.Gas("gas", "p", value, Drawn));

    private static async Task NotifyAsync(Bench bench, JsonObject resource)
    {
        resource["meta"] = new JsonObject { ["lastUpdated"] = Some.Time(TimeProvider.System.GetUtcNow()) };
        using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/{resource["resourceType"]}/{resource["id"]}", FhirClient.Content(resource));
        answer.EnsureSuccessStatusCode();
    }

    private static async Task<JsonObject> AssertOneAsync(Bench bench, decimal value, int? editions = null)
    {
        var current = await Until.Some(
            async () => (await Current()) is [var only] && only.Value() == value ? only : null, $"one current result of {value}", async () => string.Join('\n', await Current()) + bench.Thoughts());
        await bench.IdleAsync();
        Assert.Single(await Current());
        var provenances = (await bench.Fhir.ProvenancesAsync(current)).Count.ToString(CultureInfo.InvariantCulture);
        Assert.Equal(current.Version(), provenances);
        Assert.Equal(editions?.ToString(CultureInfo.InvariantCulture) ?? provenances, provenances);
        return current;

        async Task<JsonObject[]> Current() => [.. (await bench.Fhir.ResultsAsync("p", "pf-ratio")).Where(one => one.Status() != "entered-in-error")];
    }
}
