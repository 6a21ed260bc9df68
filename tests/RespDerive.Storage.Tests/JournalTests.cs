using CsCheck;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class JournalTests
{
    [Fact]
    public async Task Acknowledged_versions_survive_reopening()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1"), Some.Arrival("Observation/2"));

        await temporary.ReopenAsync();

        Assert.Equal("Observation/1 1", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        Assert.Equal("Observation/2 1", Some.Text(temporary.Store.Find("ehr", "Observation/2")));
        Assert.Single(temporary.Store.PatientsWithOpenRows(10));
    }

    [Fact]
    public async Task A_version_is_given_back_as_it_came()
    {
        await using var temporary = new TemporaryStore();
        var arrival = Some.Arrival("Observation/1") with { Base = "https://ehr.example/fhir" };
        await temporary.AppendAsync(arrival);

        var found = temporary.Store.Find("ehr", "Observation/1")!;

        Assert.Equal((arrival.Key, arrival.Base, arrival.Version, arrival.Order, arrival.Patient, arrival.Arrived, arrival.Gone),
            (found.Key, found.Base, found.Version, found.Order, found.Patient, found.Arrived, found.Gone));
        Assert.Equal(arrival.Body.ToArray(), found.Body.ToArray());
    }

    [Fact]
    public async Task Missing_parts_of_an_order_are_given_back_as_missing()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Unordered("Observation/1", "x"));

        Assert.True(temporary.Store.Find("ehr", "Observation/1")!.Order.IsUnordered);
    }

    [Fact]
    public async Task A_repeat_changes_nothing()
    {
        await using var temporary = new TemporaryStore();
        var arrival = Some.Arrival("Observation/1");
        Assert.Equal(new Appended(true, true, []).Won, (await temporary.AppendAsync(arrival))[0].Won);
        await temporary.SettleAsync();

        var repeat = (await temporary.AppendAsync(arrival with { Arrived = Some.At(2000) }))[0];

        Assert.False(repeat.New);
        Assert.False(repeat.Won);
        Assert.Empty(repeat.Patients);
        Assert.Empty(temporary.Store.PatientsWithOpenRows(10));
        Assert.Equal((1, 1), (temporary.Store.Counts().Received, temporary.Store.Counts().Repeats));
    }

    [Fact]
    public async Task A_losing_version_is_kept_but_wakes_nobody()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 2));
        await temporary.SettleAsync();

        var late = (await temporary.AppendAsync(Some.Arrival("Observation/1", version: 1)))[0];

        Assert.True(late.New);
        Assert.False(late.Won);
        Assert.Empty(late.Patients);
        Assert.Equal("Observation/1 2", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        Assert.Equal(2, temporary.Store.Counts().Received);
    }

    [Fact]
    public void Order_of_arrival_does_not_change_the_winner()
    {
        // few values, so that time and number often collide and the digest decides
        var version = Gen.Select(Gen.Int[0, 3], Gen.Int[0, 3], Gen.Int[0, 5], (time, number, content) =>
            Some.Arrival("Observation/1", content: $"content {content}", patient: $"Patient/{content % 2}") is var arrival
                ? arrival with { Order = arrival.Order with { LastUpdated = time == 0 ? null : Some.At(time), Number = number == 0 && time > 0 ? null : number + 1 } }
                : null!);
        var histories = version.List[1, 6].SelectMany(list => Gen.Shuffle(list.ToArray()).Select(shuffled => (list, shuffled)));
        histories.Sample(
            history =>
            {
                var (first, second) = (WinnerOf(history.list), WinnerOf(history.shuffled));
                var best = history.list.MaxBy(arrival => arrival.Order)!;
                return first == (best.Order, best.Patient) && second == first;
            },
            iter: 60,
            threads: 1);
    }

    [Fact]
    public async Task Between_versions_without_time_and_number_arrival_decides()
    {
        await using var temporary = new TemporaryStore();
        foreach (var content in new[] { "b", "c", "a" })
        {
            Assert.True((await temporary.AppendAsync(Some.Unordered("Observation/1", content)))[0].Won);
            Assert.Equal(content, Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        }

        Assert.False((await temporary.AppendAsync(Some.Unordered("Observation/1", "b")))[0].New);
    }

    [Fact]
    public async Task A_lower_number_with_a_later_time_wins_and_is_counted()
    {
        await using var temporary = new TemporaryStore();
        var restored = Some.Arrival("Observation/1", version: 1, content: "restored");
        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 7));

        var answer = (await temporary.AppendAsync(restored with { Order = restored.Order with { LastUpdated = Some.At(60) } }))[0];

        Assert.True(answer.Won);
        Assert.Equal(1, temporary.Store.Counts().VersionResets);
    }

    [Fact]
    public async Task A_moved_resource_wakes_the_old_and_the_new_patient()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 1, patient: "Patient/a"));
        await temporary.SettleAsync();

        var moved = (await temporary.AppendAsync(Some.Arrival("Observation/1", version: 2, patient: "Patient/b")))[0];

        var (a, b) = (temporary.Store.PatientNumber("ehr", "Patient/a")!.Value, temporary.Store.PatientNumber("ehr", "Patient/b")!.Value);
        Assert.Equal([a, b], moved.Patients);
        var (left, entered) = (temporary.Store.OpenTurn(a)!, temporary.Store.OpenTurn(b)!);
        Assert.Empty(left.Resources);
        Assert.Equal([Some.Key("Observation/1")], left.Left);
        Assert.Equal("Observation/1 2", Some.Text(Assert.Single(entered.Resources)));
        Assert.Empty(entered.Left);
    }

    [Fact]
    public async Task Same_reference_in_two_sources_is_two_patients_and_two_resources()
    {
        await using var temporary = new TemporaryStore();
        var other = Some.Arrival("Observation/1", content: "other");
        await temporary.AppendAsync(Some.Arrival("Observation/1"), other with { Key = other.Key with { Source = "lab" } });

        Assert.NotEqual(temporary.Store.PatientNumber("ehr", "Patient/a"), temporary.Store.PatientNumber("lab", "Patient/a"));
        Assert.Equal("Observation/1 1", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        Assert.Equal("other", Some.Text(temporary.Store.Find("lab", "Observation/1")));
    }

    [Fact]
    public async Task A_withdrawal_follows_the_version_known_and_a_later_version_reopens()
    {
        await using var temporary = new TemporaryStore();
        var first = Some.Arrival("Observation/1");
        await temporary.AppendAsync(first);
        await temporary.SettleAsync();
        var gone = first with { Gone = true, Patient = null, Body = default, Order = Arrival.GoneAfter(first.Order) };

        var answer = (await temporary.AppendAsync(gone))[0];

        Assert.Equal([temporary.Store.PatientNumber("ehr", "Patient/a")!.Value], answer.Patients);
        Assert.Equal("gone", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        Assert.False((await temporary.AppendAsync(first))[0].New);
        Assert.Equal("gone", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        Assert.True((await temporary.AppendAsync(Some.Arrival("Observation/1", version: 2)))[0].Won);
    }

    [Fact]
    public async Task The_same_version_seen_again_reopens_and_can_be_withdrawn_again()
    {
        await using var temporary = new TemporaryStore();
        var arrival = Some.Unordered("Observation/1", "x");
        await temporary.AppendAsync(arrival);
        for (var round = 0; round < 3; round++)
        {
            var known = temporary.Store.Find("ehr", "Observation/1")!.Order;
            var gone = Arrival.GoneAfter(known);
            Assert.True((await temporary.AppendAsync(arrival with { Gone = true, Order = gone }))[0].Won);
            Assert.True((await temporary.AppendAsync(arrival with { Order = Arrival.SeenAfter(gone) }))[0].Won);
            Assert.True(Arrival.SeenAfter(gone).CompareTo(gone) > 0 && gone.CompareTo(known) > 0);
            Assert.Equal("x", Some.Text(temporary.Store.Find("ehr", "Observation/1")));
        }
    }

    [Fact]
    public async Task A_cursor_moves_with_the_append()
    {
        await using var temporary = new TemporaryStore();
        await temporary.Store.AppendAsync([Some.Arrival("Observation/1")], new Cursor("poll", "17"));
        Assert.Equal("17", temporary.Store.Cursor("poll"));

        // a version whose source is missing breaks a constraint: neither it nor the cursor is written
        var broken = Some.Arrival("Observation/2") with { Version = null! };
        await Assert.ThrowsAnyAsync<Exception>(() => temporary.Store.AppendAsync([Some.Arrival("Observation/3"), broken], new Cursor("poll", "18")));

        Assert.Equal("17", temporary.Store.Cursor("poll"));
        Assert.Null(temporary.Store.Find("ehr", "Observation/3"));
        Assert.Null(temporary.Store.Failure);
    }

    private static (VersionOrder, string?) WinnerOf(IReadOnlyList<Arrival> arrivals) => WinnerOfAsync(arrivals).GetAwaiter().GetResult();

    private static async Task<(VersionOrder, string?)> WinnerOfAsync(IReadOnlyList<Arrival> arrivals)
    {
        await using var temporary = new TemporaryStore();
        await temporary.Store.AppendAsync(arrivals);
        var winner = temporary.Store.Find("ehr", "Observation/1")!;
        return (winner.Order, winner.Patient);
    }
}
