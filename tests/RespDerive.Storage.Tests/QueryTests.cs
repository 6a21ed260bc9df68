using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class QueryTests
{
    [Fact]
    public async Task Outcomes_are_listed_by_what_is_asked()
    {
        await using var temporary = new TemporaryStore();
        var (a, b) = (await temporary.PatientAsync("Patient/a"), await temporary.PatientAsync("Patient/b"));
        await temporary.CommitOutcomesAsync(a, 0, Some.Outcome("1", Some.At(1), 1), Some.Outcome("2", Some.At(2), null, "missing-input"),
            Some.Outcome("3", Some.At(3), null, "not-equilibrated"), Some.Outcome("4", Some.At(4), null, "missing-input", "aa-gradient"));
        await temporary.CommitOutcomesAsync(b, 0, Some.Outcome("5", Some.At(5), null, "missing-input"));

        string Listed(OutcomeFilter filter) => string.Concat(temporary.Store.Outcomes(filter).Select(found => found.Current!.Anchor.Resource.Id));

        Assert.Equal("54321", Listed(new OutcomeFilter()));
        Assert.Equal("4321", Listed(new OutcomeFilter { Patient = a }));
        Assert.Equal("432", Listed(new OutcomeFilter { Patient = a, Withheld = true }));
        Assert.Equal("1", Listed(new OutcomeFilter { Withheld = false }));
        Assert.Equal("542", Listed(new OutcomeFilter { Code = "missing-input" }));
        Assert.Equal("52", Listed(new OutcomeFilter { Code = "missing-input", Definition = "pf-ratio" }));
        Assert.Equal("432", Listed(new OutcomeFilter { From = Some.At(2), To = Some.At(4) }));
        Assert.Equal("54", Listed(new OutcomeFilter { Limit = 2 }));
    }

    [Fact]
    public async Task Withheld_outcomes_in_a_row_are_one_interval()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        string?[] codes = ["missing-input", "missing-input", "not-equilibrated", null, "missing-input", "missing-input", "missing-input"];
        await temporary.CommitOutcomesAsync(patient, 0, [.. codes.Select((code, n) => Some.Outcome($"{n}", Some.At(n), code is null ? 1 : null, code))]);
        await temporary.CommitOutcomesAsync(patient, 0, Some.Outcome("other", Some.At(7), null, "missing-input", "aa-gradient"));

        WithheldRun Run(string code, int from, int to, int count, string definition = "pf-ratio") => new(patient, definition, code, Some.At(from), Some.At(to), count);
        Assert.Equal([Run("missing-input", 7, 7, 1, "aa-gradient"), Run("missing-input", 4, 6, 3), Run("not-equilibrated", 2, 2, 1), Run("missing-input", 0, 1, 2)],
            temporary.Store.WithheldRuns(new OutcomeFilter()));
        Assert.Equal([Run("missing-input", 4, 5, 2)],
            temporary.Store.WithheldRuns(new OutcomeFilter { Patient = patient, Definition = "pf-ratio", Code = "missing-input", From = Some.At(3), To = Some.At(5) }));
    }

    [Fact]
    public async Task Counts_follow_what_happened()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var outcome = Some.Outcome("1", Some.At(1), 200);
        await temporary.CommitAsync(patient, new TurnChanges
        {
            Replaced = [Some.Key("Observation/1")],
            Readings = [Some.Reading("Observation/1", Kinds.PaO2, Some.At(1)), Some.Reading("Observation/1", Kinds.PaCO2, Some.At(1))],
            Outcomes = [Some.Change(outcome), Some.Change(Some.Outcome("2", Some.At(1), null, "missing-input"))],
        });
        await temporary.CommitOutcomesAsync(patient, 0, outcome with { Value = 150 });
        await temporary.Store.MarkDeliveredAsync(outcome.Identity, 2, "77", "1", finalSeen: true);

        Assert.Equal(
            new Counts { Received = 1, Repeats = 0, VersionResets = 0, Readings = 2, Results = 1, Revisions = 1, Retractions = 0, Withheld = 1, Delivered = 1, Refused = 0, Pending = 1 },
            temporary.Store.Counts());
    }
}
