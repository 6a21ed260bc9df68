namespace RespDerive.Storage.Tests;

public sealed class WaitingTests
{
    [Fact]
    public async Task A_reference_asked_for_twice_waits_once_and_is_done_when_read()
    {
        await using var temporary = new TemporaryStore();
        await temporary.Store.AddFetchesAsync("ehr", ["Specimen/s", "Specimen/s", "Observation?patient=a"], Some.At(0));
        Assert.Equal(2, temporary.Store.CountFetches());
        var fetch = temporary.Store.DueFetches(Some.At(0), 10)[0];

        Assert.True(await temporary.Store.FetchDoneAsync(fetch));
        Assert.Equal("Observation?patient=a", Assert.Single(temporary.Store.DueFetches(Some.At(0), 10)).Target);
    }

    [Fact]
    public async Task What_is_asked_for_while_under_way_is_read_once_more()
    {
        await using var temporary = new TemporaryStore();
        await temporary.Store.AddFetchesAsync("ehr", ["Specimen/s"], Some.At(0));
        var underWay = Assert.Single(temporary.Store.DueFetches(Some.At(0), 10));
        await temporary.Store.AddFetchesAsync("ehr", ["Specimen/s"], Some.At(1));

        Assert.False(await temporary.Store.FetchDoneAsync(underWay));

        Assert.True(await temporary.Store.FetchDoneAsync(Assert.Single(temporary.Store.DueFetches(Some.At(1), 10))));
        Assert.Equal(0, temporary.Store.CountFetches());
    }

    [Fact]
    public async Task A_failed_fetch_waits_for_its_time_also_over_a_restart()
    {
        await using var temporary = new TemporaryStore();
        await temporary.Store.AddFetchesAsync("ehr", ["Specimen/s"], Some.At(0));
        await temporary.Store.FetchRetryAsync(temporary.Store.DueFetches(Some.At(0), 10)[0].Id, 2, Some.At(5));
        await temporary.ReopenAsync();

        Assert.Empty(temporary.Store.DueFetches(Some.At(4), 10));
        Assert.Equal(2, Assert.Single(temporary.Store.DueFetches(Some.At(5), 10)).Tries);
    }

    [Fact]
    public async Task A_lease_has_one_owner_and_its_epoch_rises_when_it_changes_hands()
    {
        await using var temporary = new TemporaryStore();
        var store = temporary.Store;

        Assert.Equal(1, await store.TryLeaseAsync("poll", "one", Some.At(10), Some.At(0)));
        Assert.Null(await store.TryLeaseAsync("poll", "two", Some.At(20), Some.At(9)));
        Assert.Equal(1, await store.TryLeaseAsync("poll", "one", Some.At(15), Some.At(9)));
        Assert.Null(await store.TryLeaseAsync("poll", "two", Some.At(20), Some.At(14)));
        Assert.Equal(2, await store.TryLeaseAsync("poll", "two", Some.At(25), Some.At(15)));
        Assert.Null(await store.TryLeaseAsync("poll", "one", Some.At(30), Some.At(16)));
        Assert.False(await store.ReleaseLeaseAsync("poll", "one", 1));
        Assert.True(await store.ReleaseLeaseAsync("poll", "two", 2));
        Assert.Equal(3, await store.TryLeaseAsync("poll", "one", Some.At(30), Some.At(17)));
        Assert.Equal(4, await store.TryLeaseAsync("poll", "one", Some.At(60), Some.At(31)));
    }

    [Fact]
    public async Task A_due_time_set_anew_is_not_done_by_the_earlier_one()
    {
        await using var temporary = new TemporaryStore();
        var store = temporary.Store;
        await store.SetDueAsync(new DueItem("settle", "1", Some.At(5)));
        await store.SetDueAsync(new DueItem("settle", "2", Some.At(4)));
        Assert.Empty(store.DueItems(Some.At(3), 10));
        Assert.Equal(["2", "1"], store.DueItems(Some.At(5), 10).Select(item => item.Key));
        var item = store.DueItems(Some.At(5), 10)[1];

        await store.SetDueAsync(item with { At = Some.At(6) });

        Assert.False(await store.DueDoneAsync(item));
        Assert.True(await store.DueDoneAsync(item with { At = Some.At(6) }));
        Assert.Equal(["2"], store.DueItems(Some.At(100), 10).Select(left => left.Key));
    }

    [Fact]
    public async Task A_cursor_keeps_its_last_value()
    {
        await using var temporary = new TemporaryStore();
        Assert.Null(temporary.Store.Cursor("poll"));
        await temporary.Store.SetCursorAsync(new Cursor("poll", "1"));
        await temporary.Store.SetCursorAsync(new Cursor("poll", "2"));
        await temporary.ReopenAsync();

        Assert.Equal("2", temporary.Store.Cursor("poll"));
    }
}
