using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

public sealed class TurnTests
{
    private readonly Evaluator _evaluator = Ward.Evaluator();
    private readonly InMemoryHistory _history = new();

    private IReadOnlyList<OutcomeChange> Arrive(params Reading[] readings)
    {
        var changes = Turn.Run(_evaluator, _history, [.. readings.Select(reading => new Replacement(reading.Id.Resource, [reading]))], null);
        _history.Apply(changes);
        return changes.Outcomes;
    }

    private Outcome Current(string definition) => Assert.Single(_history.All, outcome => outcome.Definition == definition);

    [Theory]
    [InlineData(14, 18.9)]
    [InlineData(16, 11.1)]
    public void Evidence_of_effort_that_arrives_late_reaches_the_plateau_across_a_quarter_of_an_hour(double plateau, double evidence)
    {
        Arrive(Read("plat", Kinds.Plateau, 25, plateau), Read("peep", Kinds.PeepTotal, 10, plateau));
        Assert.Null(Current("driving-pressure").Withheld);
        Arrive(Read("spont", Kinds.RateSpontaneous, 4, evidence));
        Assert.Equal(Withheld.PatientNotPassive, Current("driving-pressure").Withheld);
    }

    [Fact]
    public void Late_setting_revises_the_values_drawn_after_it()
    {
        Arrive(Read("f0", Kinds.FiO2Set, 0.5, 0), Read("gas", Kinds.PaO2, 90, 200));
        Assert.Equal(180m, Current("pf-ratio").Published);
        var change = Assert.Single(Arrive(Read("f1", Kinds.FiO2Set, 0.45, 100)), change => change.Now!.Definition == "pf-ratio");
        Assert.Equal((180m, 200m), (change.Before!.Published, change.Now!.Published));
    }

    [Fact]
    public void Corrected_input_that_moves_in_time_is_one_change_of_one_result()
    {
        Arrive(Read("f0", Kinds.FiO2Set, 0.5, 0), Read("gas", Kinds.PaO2, 90, 100));
        var change = Assert.Single(Arrive(Read("gas", Kinds.PaO2, 90, 200, version: "2")), change => (change.Now ?? change.Before)!.Definition == "pf-ratio");
        Assert.NotNull(change.Before);
        Assert.Equal(Morning.AddMinutes(200), change.Now!.At);
    }

    [Fact]
    public void Withdrawn_anchor_takes_its_value_away()
    {
        Arrive(Read("f0", Kinds.FiO2Set, 0.5, 0), Read("gas", Kinds.PaO2, 90, 100));
        var changes = Turn.Run(_evaluator, _history, [new Replacement(new ResourceKey("ehr", "Observation", "gas"), [])], null);
        Assert.Contains(changes.Outcomes, change => change.Before!.Definition == "pf-ratio");
        Assert.All(changes.Outcomes, change => Assert.Null(change.Now));
    }

    [Fact]
    public void Repeated_version_changes_nothing()
    {
        var gas = Read("gas", Kinds.PaO2, 90, 100) with { Panels = ["Observation/panel"], Flags = ["zone-assumed"] };
        Arrive(Read("f0", Kinds.FiO2Set, 0.5, 0), gas);
        Assert.Empty(Arrive(gas with { Panels = ["Observation/panel"], Flags = ["zone-assumed"] }));
    }

    [Fact]
    public void New_facts_of_the_person_reach_every_value_that_uses_them()
    {
        Arrive(Read("h", Kinds.Height, 175, 0));
        Assert.Equal(Withheld.SexUnknown, Current("predicted-body-weight").Withheld);
        _history.Apply(Turn.Run(_evaluator, _history, [], Adult("female")));
        Assert.Equal(66.1m, Current("predicted-body-weight").Published);
    }

    [Fact]
    public void New_version_of_the_person_with_the_same_sex_and_birth_date_revises_nothing()
    {
        _history.Apply(Turn.Run(_evaluator, _history, [], Adult()));
        Arrive(Read("h", Kinds.Height, 175, 0));
        var changes = Turn.Run(_evaluator, _history, [], Adult() with { Version = "2" });
        Assert.Empty(changes.Outcomes);
        Assert.Equal("2", changes.Person!.Version);
    }
}
