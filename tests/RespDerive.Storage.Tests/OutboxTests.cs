using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class OutboxTests
{
    private static readonly Outcome First = Some.Outcome("x", Some.At(0), 200);

    [Fact]
    public async Task A_new_outcome_is_wanted_until_it_is_delivered()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);

        var due = Assert.Single(temporary.Store.DueDeliveries(Some.At(1), 10));
        Assert.Equal((First.Identity, patient, 1, 0, 0, false, null, 0), (due.Identity, due.Patient, due.Wanted, due.Delivered, due.Revisions, due.FinalSeen, due.ServerId, due.Tries));
        Assert.Equal(200, due.Current!.Value);
        Assert.Equal(Some.At(1), temporary.Store.OldestPending());
        Assert.True(await temporary.Store.MarkDeliveredAsync(First.Identity, due.Wanted, "77", "1", finalSeen: true));

        Assert.Empty(temporary.Store.DueDeliveries(Some.At(100), 10));
        Assert.Null(temporary.Store.OldestPending());
        var state = temporary.Store.FindDelivery(First.Identity)!;
        Assert.Equal((1, 1, 1, true, "77", "1", false), (state.Wanted, state.Delivered, state.Revisions, state.FinalSeen, state.ServerId, state.ServerVersion, state.IsPending));
    }

    [Fact]
    public async Task A_change_during_the_sending_stays_wanted()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        var sending = Assert.Single(temporary.Store.DueDeliveries(Some.At(1), 10));
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });

        await temporary.Store.MarkDeliveredAsync(First.Identity, sending.Wanted, "77", "1", finalSeen: false);

        var next = Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        Assert.Equal((2, 1, 150), (next.Wanted, next.Delivered, next.Current!.Value));
    }

    [Fact]
    public async Task Marking_twice_or_an_edition_that_was_never_wanted_changes_nothing()
    {
        await using var temporary = new TemporaryStore();
        await temporary.CommitOutcomesAsync(await temporary.PatientAsync(), 1, First);

        Assert.False(await temporary.Store.MarkDeliveredAsync(First.Identity, 2, "77", "1", finalSeen: false));
        Assert.True(await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "77", "1", finalSeen: true));
        Assert.False(await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "78", "2", finalSeen: false));

        var state = temporary.Store.FindDelivery(First.Identity)!;
        Assert.Equal((1, "77", true), (state.Revisions, state.ServerId, state.FinalSeen));
        Assert.Equal(1, temporary.Store.Counts().Delivered);
    }

    [Fact]
    public async Task A_final_edition_is_remembered_after_a_preliminary_one()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "77", "1", finalSeen: true);
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });

        await temporary.Store.MarkDeliveredAsync(First.Identity, 2, "77", "2", finalSeen: false);

        var state = temporary.Store.FindDelivery(First.Identity)!;
        Assert.Equal((2, true, "2"), (state.Revisions, state.FinalSeen, state.ServerVersion));
    }

    [Fact]
    public async Task A_retraction_carries_the_last_outcome_that_had_a_value()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.CommitOutcomesAsync(patient, 2, Some.Outcome("x", Some.At(0), null, "missing-input"));
        await temporary.CommitOutcomesAsync(patient, 3, Some.Outcome("x", Some.At(0), null, "conflicting-inputs"));
        var withheld = Assert.Single(temporary.Store.DueDeliveries(Some.At(3), 10));
        await temporary.CommitAsync(patient, new TurnChanges { Outcomes = [new OutcomeChange(First.Identity, First, null)] }, 4);
        var gone = Assert.Single(temporary.Store.DueDeliveries(Some.At(4), 10));
        await temporary.CommitOutcomesAsync(patient, 5, First with { Value = 150 });
        var again = Assert.Single(temporary.Store.DueDeliveries(Some.At(5), 10));

        Assert.Equal(("conflicting-inputs", 200, 3), (withheld.Current!.Withheld, withheld.LastValued!.Value, withheld.Wanted));
        Assert.Equal((null, 200, 4), (gone.Current, gone.LastValued!.Value, gone.Wanted));
        Assert.Equal((150, 150, 5), (again.Current!.Value, again.LastValued!.Value, again.Wanted));
        var counts = temporary.Store.Counts();
        Assert.Equal((1, 0, 0, 1), (counts.Results, counts.Withheld, counts.Revisions, counts.Retractions));
    }

    [Fact]
    public async Task A_value_withheld_from_the_start_has_nothing_to_send()
    {
        await using var temporary = new TemporaryStore();
        var outcome = Some.Outcome("x", Some.At(0), null, "missing-input");
        await temporary.CommitOutcomesAsync(await temporary.PatientAsync(), 1, outcome);
        var due = Assert.Single(temporary.Store.DueDeliveries(Some.At(1), 10));
        Assert.Null(due.LastValued);

        Assert.True(await temporary.Store.MarkNothingToSendAsync(due.Identity, due.Wanted));

        var state = temporary.Store.FindDelivery(due.Identity)!;
        Assert.Equal((false, 0, null), (state.IsPending, state.Revisions, state.ServerId));
    }

    [Fact]
    public async Task A_retry_waits_for_its_time_also_when_the_outcome_changes()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.Store.MarkRetryAsync(First.Identity, 1, Some.At(30));
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });

        Assert.Empty(temporary.Store.DueDeliveries(Some.At(29), 10));
        var due = Assert.Single(temporary.Store.DueDeliveries(Some.At(30), 10));
        Assert.Equal((1, Some.At(1)), (due.Tries, due.Since));
        await temporary.Store.MarkDeliveredAsync(First.Identity, due.Wanted, "77", "1", finalSeen: false);
        Assert.Equal(0, temporary.Store.FindDelivery(First.Identity)!.Tries);
    }

    [Fact]
    public async Task Waiting_counts_from_the_first_change_and_the_record_from_the_last()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });
        var changed = Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        await temporary.CommitAsync(patient, new TurnChanges { Outcomes = [new OutcomeChange(First.Identity, First, null)] }, 3);
        var gone = Assert.Single(temporary.Store.DueDeliveries(Some.At(3), 10));

        Assert.Equal((Some.At(1), Some.At(2)), (changed.Since, changed.Recorded));
        Assert.Equal((Some.At(1), Some.At(3)), (gone.Since, gone.Recorded));
        Assert.Equal(Some.At(1), temporary.Store.OldestPending());
    }

    [Fact]
    public async Task An_attempt_stands_until_its_edition_or_a_later_one_is_delivered()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        Assert.True(await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(1, "one", [1])));
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });
        await temporary.ReopenAsync();

        var unsure = Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        Assert.Equal((2, 1, "one"), (unsure.Wanted, unsure.Attempt!.Wanted, unsure.Attempt.Digest));
        Assert.Equal([1], unsure.Attempt.Evidence);
        Assert.True(await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "77", "1", finalSeen: true));
        var next = Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        Assert.Equal((null, 1, 1), (next.Attempt, next.Delivered, next.Revisions));

        await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(2, "two", [2]));
        await temporary.Store.MarkRetryAsync(First.Identity, 1, Some.At(3));
        Assert.Equal("two", temporary.Store.FindDelivery(First.Identity)!.Attempt!.Digest);
        await temporary.Store.MarkDeliveredAsync(First.Identity, 2, "77", "2", finalSeen: true);
        Assert.Null(temporary.Store.FindDelivery(First.Identity)!.Attempt);
    }

    [Fact]
    public async Task An_adopted_edition_settles_the_attempt_and_counts_on_from_its_revision()
    {
        await using var temporary = new TemporaryStore();
        await temporary.CommitOutcomesAsync(await temporary.PatientAsync(), 1, First);
        await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(1, "one", [1]));
        await temporary.Store.MarkRetryAsync(First.Identity, 1, Some.At(30));

        Assert.True(await temporary.Store.AdoptAsync(First.Identity, "77", "5", 4, finalSeen: true, retracted: true));

        var due = Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        Assert.Equal((null, 4, "77", "5", 0), (due.Attempt, due.Revisions, due.ServerId, due.ServerVersion, due.Tries));
        Assert.True(due is { FinalSeen: true, Retracted: true, IsPending: true });
    }

    [Fact]
    public async Task Nothing_is_attempted_of_what_is_unknown_or_withdrawn_by_a_person()
    {
        await using var temporary = new TemporaryStore();
        Assert.False(await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(1, "one", [1])));
        await temporary.CommitOutcomesAsync(await temporary.PatientAsync(), 1, First);
        await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(1, "one", [1]));

        await temporary.Store.WithdrawnByPersonAsync(First.Identity);

        Assert.Null(temporary.Store.FindDelivery(First.Identity)!.Attempt);
        Assert.False(await temporary.Store.MarkAttemptAsync(First.Identity, new Attempt(2, "two", [2])));
    }

    [Fact]
    public async Task A_parked_result_waits_for_a_person_and_is_resent_or_dropped()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.Store.ParkAsync(First.Identity, "foreign-edit", "version 3 is not ours");
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });

        Assert.Empty(temporary.Store.DueDeliveries(Some.At(100), 10));
        var parked = Assert.Single(temporary.Store.ParkedDeliveries(10));
        Assert.Equal(("foreign-edit", "version 3 is not ours"), (parked.Parked, parked.ParkedText));
        Assert.Equal((1, 0), (temporary.Store.Counts().Refused, temporary.Store.Counts().Pending));

        Assert.True(await temporary.Store.ResendAsync(First.Identity));
        Assert.Single(temporary.Store.DueDeliveries(Some.At(2), 10));
        Assert.False(await temporary.Store.ResendAsync(First.Identity));

        await temporary.Store.ParkAsync(First.Identity, "refused", "");
        Assert.True(await temporary.Store.DropAsync(First.Identity));
        Assert.Empty(temporary.Store.DueDeliveries(Some.At(100), 10));
        await temporary.CommitOutcomesAsync(patient, 3, First with { Value = 120 });
        Assert.Single(temporary.Store.DueDeliveries(Some.At(100), 10));
    }

    [Fact]
    public async Task What_a_person_has_withdrawn_is_never_wanted_again()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitOutcomesAsync(patient, 1, First);
        await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "77", "1", finalSeen: true);
        await temporary.CommitOutcomesAsync(patient, 2, First with { Value = 150 });
        Assert.True(await temporary.Store.WithdrawnByPersonAsync(First.Identity));
        Assert.False(await temporary.Store.WithdrawnByPersonAsync(First.Identity));

        await temporary.CommitOutcomesAsync(patient, 3, First with { Value = 120 });
        await temporary.CommitAsync(patient, new TurnChanges { Outcomes = [new OutcomeChange(First.Identity, First, null)] }, 4);
        await temporary.CommitOutcomesAsync(patient, 5, First with { Value = 110 });
        Assert.False(await temporary.Store.ParkAsync(First.Identity, "refused", ""));
        Assert.False(await temporary.Store.MarkDeliveredAsync(First.Identity, 5, "77", "9", finalSeen: true));

        Assert.Empty(temporary.Store.DueDeliveries(Some.At(100), 10));
        var listed = Assert.Single(temporary.Store.Outcomes(new OutcomeFilter { Code = Withheld.WithdrawnByPerson, Withheld = true }));
        Assert.True(listed.WithdrawnByPerson);
        Assert.Equal((0, 1), (temporary.Store.Counts().Results, temporary.Store.Counts().Withheld));
    }

    [Fact]
    public async Task Deliveries_of_one_turn_come_by_event_time_and_each_partition_has_its_own_patients()
    {
        await using var temporary = new TemporaryStore();
        var (a, b) = (await temporary.PatientAsync("Patient/a"), await temporary.PatientAsync("Patient/b"));
        await temporary.CommitOutcomesAsync(a, 1, Some.Outcome("late", Some.At(9), 1), Some.Outcome("early", Some.At(3), 2));
        await temporary.CommitOutcomesAsync(b, 0, Some.Outcome("other", Some.At(5), 3));

        IEnumerable<double?> Values(int limit, int partition, int partitions) =>
            temporary.Store.DueDeliveries(Some.At(1), limit, partition, partitions).Select(due => due.Current!.Value);

        Assert.Equal([3, 2, 1], Values(10, 0, 1));
        Assert.Equal([3, 2], Values(2, 0, 1));
        Assert.Equal([2, 1], Values(10, (int)(a % 2), 2));
        Assert.Equal([3], Values(10, (int)(b % 2), 2));
        Assert.Equal(3, temporary.Store.Counts().Pending);
    }

    [Fact]
    public async Task The_state_of_delivery_survives_reopening()
    {
        await using var temporary = new TemporaryStore();
        await temporary.CommitOutcomesAsync(await temporary.PatientAsync(), 1, First);
        await temporary.Store.MarkDeliveredAsync(First.Identity, 1, "77", "1", finalSeen: true);
        var before = temporary.Store.FindDelivery(First.Identity)!;

        await temporary.ReopenAsync();

        var after = temporary.Store.FindDelivery(First.Identity)!;
        Assert.Equal(before with { Current = null, LastValued = null }, after with { Current = null, LastValued = null });
        Assert.Equal(200, after.Current!.Value);
    }
}
