namespace RespDerive.Service.Tests;

/// <summary>A gas means what its Specimen says, so it waits for it.</summary>
public sealed class WaitingTests
{
    private static readonly DateTimeOffset Analysed = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Gas_waits_for_its_specimen_and_is_placed_at_the_collection()
    {
        await using var bench = await ChangedOxygenAsync();
        await Until.True(() => bench.Store.CountFetches() > 0 && bench.Store.OldestOpen() is null, "the gas waiting");
        Assert.Empty(await bench.Fhir.ResultsAsync("p"));
        Assert.Equal(0, bench.Store.Counts().Results);

        await bench.Fhir.PutAsync(Some.Specimen("blood", "p", Analysed.AddMinutes(-40)));
        var ratio = await bench.ResultAsync("p", "pf-ratio", _ => true);
        Assert.Equal(200, ratio.Value());
    }

    [Fact]
    public async Task Specimen_that_never_comes_is_given_up()
    {
        await using var bench = await ChangedOxygenAsync();
        // Without a collection time the draw is taken to be at the Observation's own time, after the change to 80 %.
        var ratio = await bench.ResultAsync("p", "pf-ratio", _ => true);
        Assert.Equal(100, ratio.Value());
        Assert.Equal(0, bench.Store.CountFetches());
    }

    private static async Task<Bench> ChangedOxygenAsync()
    {
        var bench = await Bench.StartAsync();
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("before", "p", 40, Analysed.AddMinutes(-120)));
        await bench.Fhir.PutAsync(Some.FiO2("after", "p", 80, Analysed.AddMinutes(-25)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Analysed, specimen: "blood"));
        return bench;
    }
}
