using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class FailureTests
{
    [Fact]
    public async Task A_full_disk_acknowledges_nothing_of_the_batch_and_stops_the_store()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/kept"));
        var pages = await temporary.Store.WriteAsync(session => session.Number("PRAGMA page_count"));
        await temporary.Store.WriteAsync(session => session.Number($"PRAGMA max_page_count={pages + 20}"));

        // all in one transaction with the one that does not fit
        var small = Enumerable.Range(0, 20).Select(n => Some.Arrival($"Observation/{n}")).ToList();
        var big = Some.Arrival("Observation/big") with { Body = new byte[1 << 20] };
        var (blocked, gate) = await temporary.BlockAsync();
        var writes = small.Append(big).Select(arrival => temporary.AppendAsync(arrival)).ToList();
        gate.SetResult();
        await blocked;
        await Assert.ThrowsAsync<StoreException>(() => writes[^1]);
        await Task.WhenAll(writes.Select(write => write.ContinueWith(_ => { }, TestContext.Current.CancellationToken, TaskContinuationOptions.None, TaskScheduler.Default)));

        Assert.All(writes, write => Assert.Equal("store-failed", Assert.IsType<StoreException>(write.Exception!.InnerException).Code));
        Assert.Equal("store-failed", temporary.Store.Failure!.Code);
        Assert.Same(temporary.Store.Failure, await temporary.Store.WhenFailed);
        Assert.Equal("store-failed", (await Assert.ThrowsAsync<StoreException>(() => temporary.AppendAsync(Some.Arrival("Observation/later")))).Code);
        Assert.Equal("Observation/kept 1", Some.Text(temporary.Store.Find("ehr", "Observation/kept")));

        await temporary.ReopenAsync();
        Assert.Empty(temporary.Store.CheckIntegrity());
        Assert.Equal(1, temporary.Store.Counts().Received);
        Assert.All(small, arrival => Assert.Null(temporary.Store.Find("ehr", arrival.Key.Reference)));
        Assert.True((await temporary.AppendAsync(big))[0].Won);
    }

    [Fact]
    public async Task A_conflict_fails_one_item_of_a_batch_alone()
    {
        await using var temporary = new TemporaryStore();
        var (blocked, gate) = await temporary.BlockAsync();
        var before = temporary.AppendAsync(Some.Arrival("Observation/1"));
        var conflict = temporary.Store.CommitTurnAsync(12345, 1, 0, new TurnChanges(), Some.At(0));
        var after = temporary.AppendAsync(Some.Arrival("Observation/2"));
        gate.SetResult();
        await blocked;

        await Assert.ThrowsAnyAsync<Exception>(() => conflict);
        Assert.True((await before)[0].Won);
        Assert.True((await after)[0].Won);
        Assert.Null(temporary.Store.Failure);
    }

    [Fact]
    public async Task A_caller_is_answered_only_after_another_connection_can_see_the_commit()
    {
        await using var temporary = new TemporaryStore();
        var early = 0;

        await Task.WhenAll(Enumerable.Range(0, 50).Select(async n =>
        {
            await temporary.AppendAsync(Some.Arrival($"Observation/{n}"));
            if (temporary.Store.Find("ehr", $"Observation/{n}") is null)
            {
                Interlocked.Increment(ref early);
            }
        }));

        Assert.Equal(0, early);
    }

    [Fact]
    public async Task A_closed_store_refuses_writes_and_has_written_what_waited()
    {
        await using var temporary = new TemporaryStore();
        var store = temporary.Store;
        var waiting = Enumerable.Range(0, 100).Select(n => temporary.AppendAsync(Some.Arrival($"Observation/{n}"))).ToList();
        await temporary.ReopenAsync();
        await Task.WhenAll(waiting);

        Assert.Equal(100, temporary.Store.Counts().Received);
        Assert.Equal("store-closed", (await Assert.ThrowsAsync<StoreException>(() => store.AppendAsync([]))).Code);
    }
}
