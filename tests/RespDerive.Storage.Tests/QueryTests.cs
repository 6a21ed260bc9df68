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
