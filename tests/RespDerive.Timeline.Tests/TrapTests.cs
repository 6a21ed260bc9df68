using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

/// <summary>Situations of real records that once gave a wrong number or none.</summary>
public sealed class TrapTests
{
    private static readonly Reading Gas = Read("gas", Kinds.PaO2, 80, 120);

    private static Outcome One(string definition, params Reading[] readings) => Assert.Single(Evaluate(definition, readings));

    [Theory]
    [InlineData(1.0)]
    [InlineData(0.5)]
    public void Series_charted_without_a_device_is_not_merged_into_its_first_value(double step)
    {
        var count = (int)(110 / step);
        var series = Enumerable.Range(0, count).Select(i => Read($"f{i:000}", Kinds.FiO2Set, 0.5, 5 + (i * step))).ToArray();
        Assert.True(new Slice(series, null).Of(Kinds.FiO2Set).Count >= count - 1);
        var outcome = One("pf-ratio", [Gas, .. series]);
        Assert.Equal(160m, outcome.Published);
        Assert.DoesNotContain(Flags.SettingUnconfirmed, outcome.Flags);
    }

    [Fact]
    public void Chain_uses_an_expired_volume_and_not_a_nearer_delivered_one()
    {
        var weight = Read("h", Kinds.Height, 175, -600);
        var outcome = Assert.Single(Evaluate("ventilatory-ratio", Adult(), SeaLevel, Read("co2", Kinds.PaCO2, 40, 60), weight,
            Read("exp", Kinds.TidalVolumeExpired, 300, 54), Read("del", Kinds.TidalVolume, 600, 55), Read("rr", Kinds.RateTotal, 20, 54.5)));
        Assert.Contains(outcome.Inputs, input => input.Kind == "tidal-volume-expired");
        Assert.Equal(0.91m, outcome.Published); // 6 L/min · 40 / (70.566 kg · 100 · 37.5)
    }

    [Fact]
    public void Refused_barometer_blocks_and_does_not_fall_back_to_an_older_one()
    {
        Reading[] readings = [Read("co2", Kinds.PaCO2, 40, 120), Read("f", Kinds.FiO2Set, 0.4, 30), Read("pb", Kinds.BarometricPressure, 640, 10)];
        Assert.NotNull(Assert.Single(Evaluate("alveolar-po2", null, new Policy(), readings)).Published);
        var blocked = Assert.Single(Evaluate("alveolar-po2", null, new Policy(), [.. readings, Refused("bad", Kinds.BarometricPressure, Withheld.UnitUnknown, 60)]));
        Assert.Equal(Withheld.UnitUnknown, blocked.Withheld);
        Assert.Contains(blocked.Considered, candidate => candidate.Reference == "Observation/bad/_history/1");
    }

    [Fact]
    public void Refused_reading_in_a_median_window_blocks()
    {
        Reading[] readings = [Read("gas", Kinds.PaO2, 60, 60), Read("f", Kinds.FiO2Set, 0.6, 10), Read("m", Kinds.MeanAirway, 15, 60)];
        Assert.Equal(15.0m, One("oxygenation-index", readings).Published);
        Assert.Equal(Withheld.UnitUnknown, One("oxygenation-index", [.. readings, Refused("bad", Kinds.MeanAirway, Withheld.UnitUnknown, 62)]).Withheld);
    }

    [Fact]
    public void Peep_raised_within_the_hour_is_settling_also_when_it_was_lowered_a_little_since() =>
        Assert.Contains(Flags.Settling, One("pf-ratio", Gas, Read("f", Kinds.FiO2Set, 0.5, 5),
            Read("p0", Kinds.PeepSet, 5, 10), Read("p1", Kinds.PeepSet, 15, 70), Read("p2", Kinds.PeepSet, 14, 100)).Flags);

    [Fact]
    public void End_of_another_encounter_ends_nothing()
    {
        var clinic = Read("visit", Events.EncounterEnd, 0, 90) with { Encounter = "Encounter/clinic" };
        var setting = Read("f", Kinds.FiO2Set, 0.5, 30);
        Assert.Equal(160m, One("pf-ratio", Gas, setting, clinic).Published);
        Assert.Equal(160m, One("pf-ratio", Gas, setting with { Encounter = "Encounter/icu" }, clinic).Published);
        Assert.Equal(Withheld.InputMissing, One("pf-ratio", Gas, setting with { Encounter = "Encounter/clinic" }, clinic).Withheld);
    }

    [Fact]
    public void Streamed_oxygen_fraction_of_unstated_method_that_wavers_is_no_change_of_setting()
    {
        var stream = Enumerable.Range(0, 100).Select(i => Read($"o{i:000}", Kinds.FiO2, i % 2 == 0 ? 0.5 : 0.535, 20 + i) with { Device = "Device/v", Streamed = true });
        Assert.Null(One("pf-ratio", [Gas, .. stream]).Withheld);
    }

    [Fact]
    public void Setting_under_a_policy_of_three_days_reaches_as_far_when_readings_come_one_by_one()
    {
        var policy = SeaLevel with { Sources = new Dictionary<string, SourceTiming> { ["ehr"] = new() { SettingMaxAge = TimeSpan.FromHours(72) } } };
        var (evaluator, history) = (Ward.Evaluator(policy), new InMemoryHistory());
        foreach (var reading in new[] { Gas, Read("f", Kinds.FiO2Set, 0.5, 120 - (30 * 60)) })
        {
            history.Apply(Turn.Run(evaluator, history, [new Replacement(reading.Id.Resource, [reading])], null));
        }

        Assert.Equal(160m, Assert.Single(history.All, outcome => outcome.Definition == "pf-ratio").Published);
    }

    [Fact]
    public void Story_of_a_gate_names_the_change_that_tripped_it()
    {
        var outcome = One("pf-ratio", Gas, Read("a", Kinds.FiO2Set, 0.6, 10), Read("b", Kinds.FiO2Set, 0.45, 116));
        Assert.Equal(Withheld.NotEquilibrated, outcome.Withheld);
        Assert.Equal(["Observation/a/_history/1", "Observation/b/_history/1"], outcome.Considered.Select(candidate => candidate.Reference));
    }

    [Fact]
    public void Story_of_a_missing_input_tells_only_of_that_input()
    {
        var outcome = One("aa-gradient", Gas, Read("f", Kinds.FiO2Set, 0.4, 30), Read("co2", Kinds.PaCO2, 40, 126));
        Assert.Equal(["Observation/co2/_history/1"], outcome.Considered.Select(candidate => candidate.Reference));
        Assert.Equal(["arterial carbon dioxide partial pressure"], outcome.Missing);
    }
}
