using System.Globalization;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Tests;

/// <summary>What is delivered when, and that one result never keeps the others waiting.</summary>
public sealed class DeliveryTests
{
    [Theory]
    [InlineData(30, 200.0)]
    [InlineData(180, null)]
    public async Task Published_result_follows_its_input_to_before_the_first_start(int minutes, double? value)
    {
        await using var between = await Between.StartAsync(("Delivery:PublishHistory", "false"));
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        var now = TimeProvider.System.GetUtcNow();
        await chart.GasAsync(80, at: now);
        await chart.AssertAsync(200, "CREATE");

        var then = now.AddMinutes(-minutes);
        await chart.GasAsync(80, "corrected", then);
        if (value is null)
        {
            // Nothing is in force so early: the value is withheld.
            await chart.AssertAsync(null, "CREATE", "NULLIFY");
            return;
        }

        await Until.True(async () => (await chart.CopiesAsync())[0].Status() == "corrected", "the correction");
        var corrected = await chart.AssertAsync(200, "CREATE", "UPDATE");
        Assert.Equal(then.ToUnixTimeMilliseconds(), DateTimeOffset.Parse(corrected["effectiveDateTime"]!.ToString(), CultureInfo.InvariantCulture).ToUnixTimeMilliseconds());
    }

    [Fact]
    public async Task Edition_says_when_it_came_to_be_not_since_when_another_waited()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        var corrected = new TaskCompletionSource();
        between.Next(async (_, _, _) =>
        {
            await corrected.Task;
            return Between.Failed(503);
        });
        await chart.GasAsync(64);
        await chart.IdentityAsync();
        var known = TimeProvider.System.GetUtcNow();
        await chart.GasAsync(80);
        await chart.StateAsync(state => state.Current?.Value == 200);
        corrected.SetResult();

        var result = await chart.AssertAsync(200, "CREATE");
        Assert.True(DateTimeOffset.Parse(result["issued"]!.ToString(), CultureInfo.InvariantCulture) >= known, $"{result["issued"]} before {known:O}");
    }

    [Fact]
    public async Task Result_that_cannot_be_written_is_parked_and_the_others_go_on()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        await chart.GasAsync(80);
        await chart.AssertAsync(200, "CREATE");

        // As left by another version of this software, whose revision of the definition this one does not know.
        var patient = bench.Store.PatientNumber("ehr", "Patient/p")!.Value;
        var known = bench.Store.Outcomes(new OutcomeFilter { Definition = "pf-ratio" })[0].Current!;
        var unknown = known with { Identity = NameBasedUuid.Of(NameBasedUuid.Root, "unknown"), Revision = 99, At = known.At.AddMinutes(-1) };
        var turn = bench.Store.OpenTurn(patient)!;
        Assert.True(await bench.Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo,
            new TurnChanges { Outcomes = [new OutcomeChange(unknown.Identity, null, unknown)] }, TimeProvider.System.GetUtcNow()));
        await chart.GasAsync(72, id: "other", at: Chart.Drawn.AddMinutes(5));

        await Until.True(async () => (await chart.CopiesAsync()).Any(one => one.Value() == 180), "the other result");
        await Until.True(() => bench.Store.FindDelivery(unknown.Identity)!.Parked == "not-renderable", "parked");
    }

    [Fact]
    public async Task Server_that_does_not_take_our_Device_is_told_of_and_results_wait()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        between.NextDevice((_, _, _) => Task.FromResult<Reply?>(Between.Failed(403, "suppressed")));
        await chart.OpenAsync();
        await chart.GasAsync(80);
        await Until.True(() => CapturedLogs.Text.Contains("does not take our Device: suppressed", StringComparison.Ordinal)
            || CapturedLogs.Text.Contains("\"Code\":\"suppressed\"", StringComparison.Ordinal), "a word in the log", () => CapturedLogs.Text);
        await chart.AssertAsync(200, "CREATE");
        Assert.Equal(0, bench.Store.Counts().Refused);
    }
}
