using System.Globalization;
using System.Text.Json.Nodes;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>One patient's gases, told to the service by hand, and what the server has of the ratios that follow from them.</summary>
internal sealed class Chart(Bench bench)
{
    /// <summary>Time of the first gas.</summary>
    public static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    private Guid? _identity;

    /// <summary>Patient and a fraction of 0.40, so that a gas of 80 gives 200.</summary>
    public async Task OpenAsync()
    {
        await TellAsync(Some.Patient("p"));
        await TellAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
    }

    public Task GasAsync(double value, string status = "final", DateTimeOffset? at = null, string id = "gas") => TellAsync(Some.Gas(id, "p", value, at ?? Drawn, status: status));

    public async Task TellAsync(JsonObject resource)
    {
        resource["meta"] = new JsonObject { ["lastUpdated"] = Some.Time(TimeProvider.System.GetUtcNow()) };
        using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/{resource["resourceType"]}/{resource["id"]}", FhirClient.Content(resource));
        answer.EnsureSuccessStatusCode();
    }

    /// <summary>The one result in the store, once it meets a condition.</summary>
    public Task<Storage.Delivery> StateAsync(Func<Storage.Delivery, bool> condition) => Until.Some(
        () => Task.FromResult((_identity ??= Listed) is { } known && bench.Store.FindDelivery(known) is { } state && condition(state) ? state : null),
        "a state of the delivery", () => Task.FromResult(bench.Thoughts()));

    /// <summary>Every copy at the server, by id.</summary>
    public async Task<JsonObject[]> CopiesAsync() =>
        [.. (await bench.Fhir.SearchAsync("Observation?_count=500")).Where(one => one.ResultId() is not null).OrderBy(one => one["id"]!.ToString(), StringComparer.Ordinal)];

    /// <summary>Waits until the server has the value wanted (null: retracted), then checks that each version has exactly one Provenance.</summary>
    public async Task<JsonObject> AssertAsync(decimal? value, params string[] activities)
    {
        var only = await Until.Some(
            async () => (await CopiesAsync()) is [var one] && one.Value() == value && (value is not null || one.Status() == "entered-in-error") ? one : null,
            $"one result of {value}", async () => string.Join('\n', (await CopiesAsync()).Select(one => one.ToJsonString())) + bench.Thoughts());
        await bench.IdleAsync();
        only = Assert.Single(await CopiesAsync());
        Assert.Equal(value, only.Value());
        var provenances = (await bench.Fhir.ProvenancesAsync(only)).OrderBy(Revision).ToArray();
        Assert.Equal(activities, provenances.Select(one => one.Activity()));
        Assert.Equal(Enumerable.Range(1, activities.Length), provenances.Select(Revision));
        Assert.Equal(activities.Length.ToString(CultureInfo.InvariantCulture), only.Version());
        Assert.Equal(0, bench.Store.Counts().Refused);
        return only;
    }

    public static int Revision(JsonObject provenance) => (int)provenance["target"]![0]!["extension"]![0]!["valuePositiveInt"]!;

    /// <summary>Remembers which result is meant, also when nothing calls for it any more.</summary>
    public Task IdentityAsync() => Until.True(() => (_identity ??= Listed) is not null, "a result", bench.Thoughts);

    private Guid? Listed => bench.Store.Outcomes(new OutcomeFilter { Definition = "pf-ratio" }) is [var first, ..] ? first.Identity : null;
}
