using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class TurnTests
{
    [Fact]
    public async Task Of_two_commits_of_one_turn_one_wins_and_the_other_leaves_no_trace()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.AppendAsync(Some.Arrival("Observation/1"));
        var turn = temporary.Store.OpenTurn(patient)!;
        TurnChanges Changes(int n) => new()
        {
            Replaced = [Some.Key("Observation/1")],
            Readings = [Some.Reading("Observation/1", Kinds.PaO2, Some.At(0), n)],
            Outcomes = [Some.Change(Some.Outcome($"{n}", Some.At(0), n))],
        };

        var answers = await Task.WhenAll(Enumerable.Range(0, 8).Select(n => temporary.Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo, Changes(n), Some.At(1))));

        Assert.Equal(1, answers.Count(won => won));
        using var history = temporary.Store.History(patient);
        var winner = Array.IndexOf(answers, true);
        Assert.Equal(winner, Assert.Single(history.ReadingsOf(Some.Key("Observation/1"))).Value);
        Assert.Equal(winner, Assert.Single(history.Outcomes("pf-ratio", Some.At(0), Some.At(0))).Value);
    }

    [Fact]
    public async Task What_comes_in_during_a_turn_stays_open_after_it()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.AppendAsync(Some.Arrival("Observation/1"), Some.Arrival("Observation/2"));
        var turn = temporary.Store.OpenTurn(patient)!;

        await temporary.AppendAsync(Some.Arrival("Observation/1", version: 2));
        Assert.True(await temporary.Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo, new TurnChanges(), Some.At(0)));

        var next = temporary.Store.OpenTurn(patient)!;
        Assert.Equal(turn.Turn + 1, next.Turn);
        Assert.Equal("Observation/1 2", Some.Text(Assert.Single(next.Resources)));
    }

    [Fact]
    public async Task A_turn_takes_a_part_and_leaves_the_rest_open()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync([.. Enumerable.Range(1, 5).Select(n => Some.Arrival($"Observation/{n}"))]);
        var patient = temporary.Store.PatientNumber("ehr", "Patient/a")!.Value;

        var turn = temporary.Store.OpenTurn(patient, limit: 3)!;
        Assert.True(await temporary.Store.CommitTurnAsync(patient, turn.Turn, turn.UpTo, new TurnChanges(), Some.At(0)));
        var rest = temporary.Store.OpenTurn(patient, limit: 3)!;

        Assert.Equal((3, true), (turn.Resources.Count, turn.More));
        Assert.Equal((2, false), (rest.Resources.Count, rest.More));
    }

    [Fact]
    public async Task Replaced_readings_are_gone_also_when_nothing_takes_their_place()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var (one, two) = (Some.Key("Observation/1"), Some.Key("Observation/2"));
        await temporary.CommitAsync(patient, new TurnChanges
        {
            Replaced = [one, two],
            Readings = [Some.Reading("Observation/1", Kinds.PaO2, Some.At(0)), Some.Reading("Observation/1", Kinds.PaCO2, Some.At(0), part: "x"), Some.Reading("Observation/2", Kinds.PaO2, Some.At(5))],
        });

        await temporary.CommitAsync(patient, new TurnChanges { Replaced = [one] });

        using var history = temporary.Store.History(patient);
        Assert.Empty(history.ReadingsOf(one));
        Assert.Single(history.ReadingsOf(two));
        Assert.Equal(1, temporary.Store.Counts().Readings);
    }

    [Fact]
    public async Task The_turn_of_the_patient_that_a_resource_left_does_not_touch_the_readings_of_the_other()
    {
        await using var temporary = new TemporaryStore();
        var (a, b) = (await temporary.PatientAsync("Patient/a"), await temporary.PatientAsync("Patient/b"));
        var key = Some.Key("Observation/1");
        await temporary.CommitAsync(b, new TurnChanges { Replaced = [key], Readings = [Some.Reading("Observation/1", Kinds.PaO2, Some.At(0))] });

        await temporary.CommitAsync(a, new TurnChanges { Replaced = [key] });

        using var history = temporary.Store.History(b);
        Assert.Single(history.ReadingsOf(key));
    }

    [Fact]
    public async Task An_outcome_of_another_patient_is_refused_whole_and_alone()
    {
        await using var temporary = new TemporaryStore();
        var (a, b) = (await temporary.PatientAsync("Patient/a"), await temporary.PatientAsync("Patient/b"));
        await temporary.CommitOutcomesAsync(a, 0, Some.Outcome("x", Some.At(0), 200));

        var refused = temporary.CommitAsync(b, new TurnChanges { Outcomes = [Some.Change(Some.Outcome("y", Some.At(0), 1)), Some.Change(Some.Outcome("x", Some.At(0), 100))] });

        await Assert.ThrowsAsync<InvalidOperationException>(() => refused);
        Assert.Null(temporary.Store.Failure);
        using var history = temporary.Store.History(b);
        Assert.Empty(history.Outcomes("pf-ratio", Some.At(0), Some.At(0)));
        Assert.Equal(200, temporary.Store.FindDelivery(Some.Outcome("x", Some.At(0), 0).Identity)!.Current!.Value);
    }

    [Fact]
    public async Task A_reading_of_a_resource_that_is_not_replaced_is_refused_without_naming_it()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();

        var refusal = await Assert.ThrowsAsync<ArgumentException>(() => temporary.CommitAsync(patient,
            new TurnChanges { Readings = [Some.Reading("Observation/secret-id", Kinds.PaO2, Some.At(0))] }));

        Assert.DoesNotContain("secret-id", refusal.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Due_times_of_a_turn_are_set_with_it_and_not_by_the_one_that_lost()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        Task<bool> Commit(string key) =>
            temporary.Store.CommitTurnAsync(patient, 1, 0, new TurnChanges(), Some.At(0), [new DueItem("settle", key, Some.At(15))]);

        Assert.True(await Commit("won"));
        Assert.False(await Commit("lost"));

        Assert.Equal("won", Assert.Single(temporary.Store.DueItems(Some.At(15), 10)).Key);
    }

    [Fact]
    public async Task The_person_is_kept_until_changed()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var person = new Person(Some.Key("Patient/a"), "1", "female", "1960-05") { Base = "https://ehr.example/fhir" };
        await temporary.CommitAsync(patient, new TurnChanges { Person = person });
        await temporary.CommitAsync(patient, new TurnChanges());

        using var history = temporary.Store.History(patient);
        Assert.Equal(person, history.Person);
    }

    [Fact]
    public async Task Patients_with_open_rows_come_longest_waiting_first()
    {
        await using var temporary = new TemporaryStore();
        await temporary.AppendAsync(Some.Arrival("Observation/1", patient: "Patient/b"), Some.Arrival("Observation/2", patient: "Patient/a"));
        var (a, b) = (temporary.Store.PatientNumber("ehr", "Patient/a")!.Value, temporary.Store.PatientNumber("ehr", "Patient/b")!.Value);

        Assert.Equal([b, a], temporary.Store.PatientsWithOpenRows(10));
        Assert.Equal([b], temporary.Store.PatientsWithOpenRows(1));
        Assert.Equal(Some.At(1000), temporary.Store.OldestOpen());
        await temporary.SettleAsync();
        Assert.Empty(temporary.Store.PatientsWithOpenRows(10));
        Assert.Null(temporary.Store.OldestOpen());
    }

    [Fact]
    public async Task An_unknown_patient_has_no_turn()
    {
        await using var temporary = new TemporaryStore();

        Assert.Null(temporary.Store.OpenTurn(99));
        Assert.Null(temporary.Store.PatientNumber("ehr", "Patient/a"));
        Assert.Null(temporary.Store.PatientName(99));
    }
}
