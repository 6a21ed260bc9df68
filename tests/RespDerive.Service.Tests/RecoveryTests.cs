using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>
/// Answers that never come, and an end of the service while it waits for one: what the server holds then is known again by its
/// content, and the delivery goes on from there.
/// </summary>
public sealed class RecoveryTests
{
    [Fact]
    public async Task Value_withdrawn_while_its_answer_was_outstanding_is_retracted_after_a_crash()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        var (created, _) = between.KeepNextAnswer();
        await chart.GasAsync(80);
        await chart.IdentityAsync();
        await created;
        await chart.GasAsync(80, "entered-in-error");
        await chart.StateAsync(state => state.Current is null);
        await bench.StopServiceAsync();

        await bench.StartServiceAsync();
        var retracted = await chart.AssertAsync(null, "CREATE", "NULLIFY");
        Assert.Equal("entered-in-error", retracted.Status());
    }

    [Fact]
    public async Task Crash_after_the_create_neither_doubles_nor_forgets_anything()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        var (created, _) = between.KeepNextAnswer();
        await chart.GasAsync(80);
        await created;
        await bench.StopServiceAsync();

        await bench.StartServiceAsync();
        await chart.AssertAsync(200, "CREATE");
    }

    [Fact]
    public async Task Crash_before_anything_was_sent_only_delays()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        var reached = new TaskCompletionSource();
        between.Next(async (_, _, left) =>
        {
            reached.SetResult();
            await Task.Delay(Timeout.InfiniteTimeSpan, left).ContinueWith(_ => { }, TaskScheduler.Default);
            return null;
        });
        await chart.GasAsync(80);
        await reached.Task.WaitAsync(TimeSpan.FromSeconds(20), TestContext.Current.CancellationToken);
        await bench.StopServiceAsync();

        await bench.StartServiceAsync();
        await chart.AssertAsync(200, "CREATE");
    }

    [Fact]
    public async Task Correction_that_comes_before_a_lost_answer_is_missed_follows_the_edition_it_corrects()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        await chart.GasAsync(64);
        await chart.IdentityAsync();
        await chart.AssertAsync(160, "CREATE");
        var (updated, lose) = between.KeepNextAnswer();
        await chart.GasAsync(72);
        await updated;
        await chart.GasAsync(80);
        await chart.StateAsync(state => state.Current?.Value == 200);
        lose.SetResult();

        await chart.AssertAsync(200, "CREATE", "UPDATE", "UPDATE");
    }

    [Fact]
    public async Task Retraction_whose_answer_was_lost_is_ours_and_the_reinstated_value_follows()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        await chart.GasAsync(80);
        await chart.IdentityAsync();
        await chart.AssertAsync(200, "CREATE");
        var (retracted, lose) = between.KeepNextAnswer();
        await chart.GasAsync(80, "entered-in-error");
        await retracted;
        await chart.GasAsync(88);
        await chart.StateAsync(state => state.Current is not null);
        lose.SetResult();

        var again = await chart.AssertAsync(220, "CREATE", "NULLIFY", "UPDATE");
        Assert.Equal("amended", again.Status());
    }

    [Fact]
    public async Task Edition_carried_out_late_is_known_by_its_Provenance()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        await chart.GasAsync(64);
        await chart.IdentityAsync();
        await chart.AssertAsync(160, "CREATE");
        JsonObject? slow = null;
        var cut = new TaskCompletionSource();
        between.Next(async (sent, _, _) =>
        {
            slow = sent;
            await cut.Task;
            return null;
        });
        between.Next(async (sent, pass, _) =>
        {
            await pass(slow!);
            return await pass(sent);
        });
        await chart.GasAsync(72);
        await Until.True(() => slow is not null, "an edition on its way");
        await chart.GasAsync(80);
        await chart.StateAsync(state => state.Current?.Value == 200);
        cut.SetResult();

        await chart.AssertAsync(200, "CREATE", "UPDATE", "UPDATE");
    }

    [Fact]
    public async Task Half_a_transaction_and_a_crash_leave_one_Provenance_for_each_edition()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        var halfDone = new TaskCompletionSource();
        between.Next(async (sent, pass, left) =>
        {
            await pass(Between.Only(sent, entry => Type(entry) == "Observation"));
            halfDone.SetResult();
            await Task.Delay(Timeout.InfiniteTimeSpan, left).ContinueWith(_ => { }, TaskScheduler.Default);
            return null;
        });
        await chart.GasAsync(64);
        await chart.IdentityAsync();
        await halfDone.Task.WaitAsync(TimeSpan.FromSeconds(20), TestContext.Current.CancellationToken);

        // By the time of the restart another edition is wanted; the first still gets its own testimony.
        await chart.GasAsync(80);
        await chart.StateAsync(state => state.Current?.Value == 200);
        await bench.StopServiceAsync();
        await bench.StartServiceAsync();
        await chart.AssertAsync(200, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task Provenance_of_an_edition_that_never_was_is_taken_back()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        await chart.GasAsync(64);
        await chart.AssertAsync(160, "CREATE");
        between.Next(async (sent, pass, _) =>
        {
            await pass(Between.Only(sent, entry => Type(entry) == "Provenance"));
            return null;
        });
        await chart.GasAsync(80);
        await chart.AssertAsync(200, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task Edition_refused_given_up_and_there_all_the_same_is_followed_by_the_next()
    {
        await using var between = await Between.StartAsync();
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await chart.OpenAsync();
        await chart.GasAsync(64);
        await chart.AssertAsync(160, "CREATE");
        between.Next(async (sent, pass, _) =>
        {
            await pass(sent);
            return Between.Failed(422, "business-rule");
        });
        await chart.GasAsync(72);
        var refused = await chart.StateAsync(state => state.Parked == "business-rule");
        Assert.True(await bench.Store.DropAsync(refused.Identity));
        await chart.GasAsync(80);
        await chart.AssertAsync(200, "CREATE", "UPDATE", "UPDATE");
    }

    [Fact]
    public async Task Version_that_the_server_does_not_tell_is_read()
    {
        await using var between = await Between.StartAsync();
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        between.Next(async (sent, pass, _) =>
        {
            var reply = await pass(sent);
            foreach (var entry in reply.Body!["entry"]!.AsArray())
            {
                var response = entry!["response"]!.AsObject();
                response["location"] = response["location"]!.ToString().Split("/_history")[0];
                response.Remove("etag");
                entry.AsObject().Remove("resource");
            }

            return reply;
        });
        await chart.GasAsync(64);
        await chart.AssertAsync(160, "CREATE");
        await chart.GasAsync(80);
        await chart.AssertAsync(200, "CREATE", "UPDATE");
    }

    private static string Type(JsonNode entry) => entry["resource"]!["resourceType"]!.ToString();
}
