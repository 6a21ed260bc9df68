using System.Text.Json.Nodes;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>When a resource can no longer be read, and when it can again.</summary>
public sealed class DisappearanceTests : IDisposable
{
    private static readonly TimeSpan HalfADay = TimeSpan.FromHours(12);
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);
    private readonly OddServer _server = new();
    private readonly JsonObject _gas = Versioned(Some.Gas("gas", "p", 80, Drawn));
    private volatile int _gasStatus = 200;
    private volatile int _patientStatus = 200;

    public DisappearanceTests()
    {
        _server.On("GET", "/fhir/Observation/gas", _ => _gasStatus == 200 ? OddServer.Json(200, _gas) : OddServer.Text(_gasStatus, ""));
        _server.On("GET", "/fhir/Patient/p", _ => _patientStatus == 200 ? OddServer.Json(200, Some.Patient("p")) : OddServer.Text(_patientStatus, ""));
    }

    public void Dispose() => _server.Dispose();

    [Fact]
    public async Task Only_reads_that_find_nothing_count_towards_a_withdrawal()
    {
        await using var alone = await WithRatioAsync();
        _gasStatus = 503;
        await alone.TellDeletedAsync("Observation/gas");
        await Until.True(() => Waiting(alone) is { Tries: >= 2, Missing: 0 }, "failed reads");

        await MissingAsync(alone, 1);
        await MissingAsync(alone, 2);
        _gasStatus = 503;
        alone.Clock.Forward(HalfADay);
        await Until.True(() => Waiting(alone) is { Missing: 0 }, "a count started anew");

        await MissingAsync(alone, 1);
        await MissingAsync(alone, 2);
        Assert.Equal(200, alone.Ratio());
        alone.Clock.Forward(HalfADay);
        await Until.True(() => alone.Ratio() is null, "the withdrawal after three such reads over a day");
        Assert.Null(Waiting(alone));
    }

    [Fact]
    public async Task Reads_while_not_even_the_patient_can_be_read_do_not_count()
    {
        await using var alone = await WithRatioAsync();
        _patientStatus = 403;
        _gasStatus = 403;
        await alone.TellDeletedAsync("Observation/gas");
        for (var tries = 1; tries <= 4; tries++)
        {
            await Until.True(() => Waiting(alone) is { Missing: 0 } fetch && fetch.Tries == tries, "a read that says nothing");
            alone.Clock.Forward(HalfADay);
        }

        Assert.Equal(200, alone.Ratio());
    }

    [Fact]
    public async Task Same_version_readable_again_reopens()
    {
        await using var alone = await WithRatioAsync();
        await WithdrawAsync(alone);
        _gasStatus = 200;
        await alone.TellAsync(_gas);
        await Until.True(() => alone.Ratio() == 200, "the value again");

        await WithdrawAsync(alone);
        _gasStatus = 200;
        await alone.TellDeletedAsync("Observation/gas");
        await Until.True(() => alone.Ratio() == 200, "the value once more");
    }

    [Fact]
    public async Task Late_news_of_what_was_deleted_does_not_bring_it_back()
    {
        await using var alone = await WithRatioAsync();
        await WithdrawAsync(alone);
        await alone.TellAsync(_gas);
        await Until.True(() => alone.Store.CountFetches() == 0, "the read that tells");
        await alone.SettledAsync();
        Assert.True(alone.Store.Find("ehr", "Observation/gas")!.Gone);
        Assert.Null(alone.Ratio());
    }

    private async Task WithdrawAsync(Alone alone)
    {
        _gasStatus = 410;
        await alone.TellDeletedAsync("Observation/gas");
        await Until.True(() => alone.Ratio() is null, "the withdrawal");
        await Until.True(() => alone.Store.CountFetches() == 0, "nothing to be read");
    }

    /// <summary>The next read, half a day later at most, finds nothing.</summary>
    private async Task MissingAsync(Alone alone, int count)
    {
        _gasStatus = 404;
        alone.Clock.Forward(HalfADay);
        await Until.True(() => Waiting(alone)?.Missing == count, $"{count} reads that found nothing");
        Assert.False(alone.Store.Find("ehr", "Observation/gas")!.Gone);
    }

    private static Fetch? Waiting(Alone alone) => alone.Store.DueFetches(DateTimeOffset.MaxValue, 10) is [var only] ? only : null;

    private async Task<Alone> WithRatioAsync()
    {
        var alone = await Alone.StartAsync(_server);
        await alone.TellAsync(Versioned(Some.Patient("p")), Versioned(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60))), _gas);
        await Until.True(() => alone.Ratio() == 200, "the value");
        return alone;
    }

    private static JsonObject Versioned(JsonObject resource)
    {
        resource["meta"] = new JsonObject { ["versionId"] = "1", ["lastUpdated"] = Some.Time(Drawn.AddMinutes(10)) };
        return resource;
    }
}
