using CsCheck;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class HistoryTests
{
    private static readonly Kind[] Few = [Kinds.PaO2, Kinds.FiO2, Events.SupportEnd];

    [Fact]
    public void Readings_of_ranges_are_those_of_the_rule_in_words()
    {
        var reading = Gen.Select(Gen.Int[0, 2], Gen.Int[0, 240]);
        var range = Gen.Select(Gen.Int[0, 2], Gen.Int[0, 240], Gen.Int[-10, 60], Gen.Int[0, 60], (kind, from, length, back) =>
            new KindRange(Few[kind], Half(from), Half(from + length), TimeSpan.FromMinutes(back * 0.5)));
        Gen.Select(reading.List[0, 60], range.List[1, 8]).Sample(
            (readings, ranges) => CheckAsync(readings, ranges).GetAwaiter().GetResult(), iter: 150, threads: 1);
    }

    [Fact]
    public async Task The_last_reading_before_a_range_comes_with_its_possible_copies()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        double[] minutes = [0, 57, 58, 60, 80];
        await temporary.CommitAsync(patient, Changes([.. minutes.Select((minute, n) => Some.Reading($"Observation/{n}", Kinds.FiO2, Some.At(minute)))]));
        using var history = temporary.Store.History(patient);

        IEnumerable<double> Found(double from, double back) => history
            .Readings([new KindRange(Kinds.FiO2, Some.At(from), Some.At(100), TimeSpan.FromMinutes(back))])
            .Select(found => (found.At - Some.Start).TotalMinutes).Order();

        Assert.Equal([80], Found(70, 0));
        Assert.Equal([80], Found(70, 9.9));
        Assert.Equal([58, 60, 80], Found(70, 10));
        Assert.Equal([57, 58, 60, 80], Found(60, 10));
        Assert.Equal([0, 57, 58, 60, 80], Found(57, 60));
    }

    [Fact]
    public async Task Overlapping_ranges_give_each_reading_once()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        await temporary.CommitAsync(patient, Changes([Some.Reading("Observation/1", Kinds.FiO2, Some.At(0))]));
        using var history = temporary.Store.History(patient);

        var range = new KindRange(Kinds.FiO2, Some.At(0), Some.At(1), TimeSpan.Zero);
        Assert.Single(history.Readings([range, range with { From = Some.At(-5) }]));
    }

    [Fact]
    public async Task A_history_sees_nothing_that_is_written_after_it_was_opened()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        using var history = temporary.Store.History(patient);

        await temporary.CommitAsync(patient, Changes([Some.Reading("Observation/1", Kinds.FiO2, Some.At(0))]));
        await temporary.AppendAsync(Some.Arrival("Specimen/s"));

        Assert.Empty(history.ReadingsOf(Some.Key("Observation/1")));
        Assert.Null(history.Find("ehr", "Specimen/s"));
        using var later = temporary.Store.History(patient);
        Assert.Single(later.ReadingsOf(Some.Key("Observation/1")));
        Assert.NotNull(later.Find("ehr", "Specimen/s"));
    }

    [Fact]
    public async Task Outcomes_are_those_of_the_definition_and_range_that_still_stand()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var gone = Some.Outcome("gone", Some.At(5), 3);
        await temporary.CommitOutcomesAsync(patient, 0, Some.Outcome("a", Some.At(0), 1), Some.Outcome("b", Some.At(10), null, "missing-input"),
            Some.Outcome("c", Some.At(11), 2), Some.Outcome("d", Some.At(5), 2, definition: "aa-gradient"), gone);
        await temporary.CommitAsync(patient, new TurnChanges { Outcomes = [new OutcomeChange(gone.Identity, gone, null)] });

        using var history = temporary.Store.History(patient);

        Assert.Equal(["Observation/a", "Observation/b"],
            history.Outcomes("pf-ratio", Some.At(0), Some.At(10)).Select(outcome => outcome.Anchor.Resource.Reference));
    }

    [Fact]
    public async Task Reading_goes_on_while_all_histories_are_held()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var held = Enumerable.Range(0, 8).Select(_ => temporary.Store.History(patient)).ToList();

        Assert.NotNull(temporary.Store.Find("ehr", "Patient/a"));
        Assert.True(await temporary.CommitAsync(patient, new TurnChanges()));
        held.ForEach(history => history.Dispose());
    }

    [Fact]
    public async Task Histories_of_more_callers_than_connections_wait_for_each_other()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();

        await Task.WhenAll(Enumerable.Range(0, 40).Select(_ => Task.Run(() =>
        {
            using var history = temporary.Store.History(patient);
            return history.Person;
        }, TestContext.Current.CancellationToken)));
    }

    private static DateTimeOffset Half(int halves) => Some.At(halves * 0.5);

    private static TurnChanges Changes(Reading[] readings) =>
        new() { Replaced = [.. readings.Select(reading => reading.Id.Resource)], Readings = readings };

    private static async Task<bool> CheckAsync(List<(int Kind, int Half)> rows, List<KindRange> ranges)
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var readings = rows.Select((row, n) => Some.Reading($"Observation/{n}", Few[row.Kind], Half(row.Half))).ToArray();
        await temporary.CommitAsync(patient, Changes(readings));
        using var history = temporary.Store.History(patient);
        return history.Readings(ranges).Select(found => found.Id).Order().SequenceEqual(ByWords(readings, ranges).Order());
    }

    private static HashSet<ReadingId> ByWords(Reading[] readings, List<KindRange> ranges)
    {
        var found = new HashSet<ReadingId>();
        foreach (var range in ranges)
        {
            var kind = readings.Where(reading => reading.Kind == range.Kind).ToList();
            found.UnionWith(kind.Where(reading => reading.At >= range.From && reading.At <= range.To).Select(reading => reading.Id));
            if (range.Back > TimeSpan.Zero
                && kind.Where(reading => reading.At < range.From && range.From - reading.At <= range.Back).MaxBy(reading => reading.At) is { } last)
            {
                found.UnionWith(kind.Where(reading => reading.At <= last.At && last.At - reading.At <= TimeSpan.FromMinutes(2)).Select(reading => reading.Id));
            }
        }

        return found;
    }
}
