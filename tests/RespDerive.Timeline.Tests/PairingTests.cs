using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

public sealed class PairingTests
{
    private static readonly Reading Gas = Read("gas", Kinds.PaO2, 90, 120);

    private static Outcome One(string definition, params Reading[] readings) => Assert.Single(Evaluate(definition, readings));

    [Fact]
    public void Setting_in_force_at_the_draw_is_used_not_the_one_after_it()
    {
        var outcome = One("pf-ratio", Gas, Read("f0", Kinds.FiO2Set, 0.5, 20), Read("f1", Kinds.FiO2Set, 0.45, 60), Read("f2", Kinds.FiO2Set, 0.9, 121));
        Assert.Equal(200m, outcome.Published);
        Assert.Equal("f1", outcome.Inputs.Single(input => input.Kind == "fio2-set").Readings[0].Resource.Id);
    }

    [Fact]
    public void Setting_older_than_its_maximal_age_is_not_in_force() =>
        Assert.Equal(Withheld.InputMissing, One("pf-ratio", Gas, Read("f1", Kinds.FiO2Set, 0.45, 120 - 241)).Withheld);

    [Fact]
    public void Setting_charted_on_change_stays_in_force_for_a_day()
    {
        var policy = SeaLevel with { Sources = new Dictionary<string, SourceTiming> { ["ehr"] = new() { SettingMaxAge = TimeSpan.FromHours(24) } } };
        var outcome = Assert.Single(Evaluate("pf-ratio", null, policy, Gas, Read("f1", Kinds.FiO2Set, 0.45, 120 - 241)));
        Assert.Equal(200m, outcome.Published);
        Assert.Contains(Flags.SettingUnconfirmed, outcome.Flags);
    }

    [Fact]
    public void Event_that_ends_support_ends_the_setting()
    {
        var end = Read("end", Events.SupportEnd, 0, 90);
        Assert.Equal(Withheld.InputMissing, One("pf-ratio", Gas, Read("f1", Kinds.FiO2Set, 0.45, 60), end).Withheld);
    }

    [Fact]
    public void Measured_oxygen_wins_over_set_when_fresh()
    {
        var outcome = One("pf-ratio", Gas, Read("s", Kinds.FiO2Set, 0.40, 30), Read("m", Kinds.FiO2Measured, 0.45, 117));
        Assert.Equal(200m, outcome.Published);
    }

    [Fact]
    public void Measured_oxygen_older_than_the_last_change_is_not_used()
    {
        var outcome = One("pf-ratio", Gas, Read("s0", Kinds.FiO2Set, 0.60, 10), Read("m", Kinds.FiO2Measured, 0.60, 116), Read("s1", Kinds.FiO2Set, 0.45, 117));
        Assert.Equal(Withheld.NotEquilibrated, outcome.Withheld);
    }

    [Theory]
    [InlineData(9.9, Withheld.NotEquilibrated, false)]
    [InlineData(10, null, true)]
    [InlineData(19.9, null, true)]
    [InlineData(20, null, false)]
    public void Change_of_oxygen_before_the_draw_withholds_then_flags(double minutesBefore, string? withheld, bool settling)
    {
        var outcome = One("pf-ratio", Gas, Read("a", Kinds.FiO2Set, 0.6, 10), Read("b", Kinds.FiO2Set, 0.45, 120 - minutesBefore));
        Assert.Equal(withheld, outcome.Withheld);
        Assert.Equal(settling, outcome.Flags.Contains(Flags.Settling));
    }

    [Fact]
    public void Step_below_three_percent_is_no_change() =>
        Assert.Null(One("pf-ratio", Gas, Read("a", Kinds.FiO2Set, 0.47, 10), Read("b", Kinds.FiO2Set, 0.45, 118)).Withheld);

    [Fact]
    public void First_known_setting_shortly_before_the_draw_is_flagged_as_possibly_settling() =>
        Assert.Contains(Flags.SettlingUnknown, One("pf-ratio", Gas, Read("b", Kinds.FiO2Set, 0.45, 115)).Flags);

    [Fact]
    public void Disagreeing_oxygen_fractions_of_one_minute_withhold() =>
        Assert.Equal(Withheld.ConflictingInputs, One("pf-ratio", Gas, Read("a", Kinds.FiO2Set, 0.40, 90), Read("b", Kinds.FiO2, 0.50, 90.5)).Withheld);

    [Fact]
    public void Unusable_oxygen_fraction_blocks_and_does_not_fall_back()
    {
        var outcome = One("pf-ratio", Gas, Read("a", Kinds.FiO2Set, 0.45, 30), Refused("b", Kinds.FiO2Set, Withheld.Fio2UnitImplausible, 100));
        Assert.Equal(Withheld.Fio2UnitImplausible, outcome.Withheld);
        Assert.Contains(outcome.Considered, candidate => candidate.Reference == "Observation/b/_history/1" && candidate.Reason == Withheld.Fio2UnitImplausible);
    }

    [Fact]
    public void Refused_anchor_is_a_called_anchor_with_a_reason() =>
        Assert.Equal(Withheld.UnitUnknown, One("pf-ratio", Refused("gas", Kinds.PaO2, Withheld.UnitUnknown, 120)).Withheld);

    [Fact]
    public void Carbon_dioxide_of_another_sample_is_never_used()
    {
        var paco2 = Read("co2", Kinds.PaCO2, 40, 120) with { Specimen = "Specimen/b" };
        Assert.Equal(Withheld.InputMissing, One("aa-gradient", Gas with { Specimen = "Specimen/a" }, paco2, Read("f", Kinds.FiO2Set, 0.4, 30)).Withheld);
    }

    [Fact]
    public void Carbon_dioxide_of_the_same_specimen_is_used_whatever_the_charted_time()
    {
        var paco2 = Read("co2", Kinds.PaCO2, 40, 123) with { Specimen = "Specimen/a" };
        var outcome = One("aa-gradient", Gas with { Specimen = "Specimen/a" }, paco2, Read("f", Kinds.FiO2Set, 0.4, 30));
        Assert.Equal(Math.Round((0.4 * 713) - (40 * (0.4 + (0.6 / 0.8))) - 90), (double)outcome.Published!.Value);
        Assert.Contains(outcome.Intermediates, intermediate => intermediate.Definition == "alveolar-po2");
    }

    [Fact]
    public void Barometric_pressure_is_never_assumed()
    {
        var paco2 = Read("co2", Kinds.PaCO2, 40, 120);
        var outcome = Assert.Single(Evaluate("aa-gradient", null, new Policy(), Gas, paco2, Read("f", Kinds.FiO2Set, 0.4, 30)));
        Assert.Equal(Withheld.PressureUnknown, outcome.Withheld);
    }

    [Fact]
    public void Altitude_gives_pressure_and_an_implausible_barometer_is_ignored()
    {
        // ISO 2533 standard atmosphere at 1609 m: 625.8 mm[Hg]
        var policy = new Policy { AltitudeMetres = 1609 };
        Reading[] readings = [Gas, Read("co2", Kinds.PaCO2, 40, 120), Read("f", Kinds.FiO2Set, 0.4, 30)];
        var standard = Assert.Single(Evaluate("alveolar-po2", null, policy, readings));
        Assert.Equal(625.8, standard.Inputs.Single(input => input.Kind == "barometric-pressure").Value, 0.1);
        var seaLevelReport = Assert.Single(Evaluate("alveolar-po2", null, policy, [.. readings, Read("pb", Kinds.BarometricPressure, 760, 100)]));
        Assert.Equal(standard.Value, seaLevelReport.Value);
        var barometer = Assert.Single(Evaluate("alveolar-po2", null, policy, [.. readings, Read("pb", Kinds.BarometricPressure, 632, 100)]));
        Assert.Equal(632, barometer.Inputs.Single(input => input.Kind == "barometric-pressure").Value);
    }

    [Fact]
    public void Policy_in_force_at_the_event_time_is_used()
    {
        var evaluator = Ward.Evaluator(new Policy { PressureMmHg = 760 }, new Policy { PressureMmHg = 700, ValidFrom = Morning.AddMinutes(200) });
        var slice = new Slice([Read("early", Kinds.PaCO2, 40, 100), Read("late", Kinds.PaCO2, 40, 300), Read("f", Kinds.FiO2Set, 0.4, 99), Read("g", Kinds.FiO2Set, 0.4, 250)], null);
        var outcomes = evaluator.Evaluate(Catalogue.Shipped.Find("alveolar-po2")!, slice, DateTimeOffset.MinValue, DateTimeOffset.MaxValue);
        Assert.Equal([760, 700], outcomes.Select(outcome => outcome.Inputs.Single(input => input.Kind == "barometric-pressure").Value));
    }

    [Fact]
    public void Copies_of_one_fact_call_once_and_the_one_with_a_specimen_is_used()
    {
        var outcome = One("pf-ratio", Gas, Read("zcopy", Kinds.PaO2, 90.2, 120.5) with { Specimen = "Specimen/a" }, Read("f", Kinds.FiO2Set, 0.45, 30));
        Assert.Equal("zcopy", outcome.Anchor.Resource.Id);
    }

    [Fact]
    public void Unequal_values_at_one_time_stay_two_and_are_flagged()
    {
        var outcomes = Evaluate("pf-ratio", Gas, Read("other", Kinds.PaO2, 60, 120), Read("f", Kinds.FiO2Set, 0.45, 30));
        Assert.Equal(2, outcomes.Count);
        Assert.All(outcomes, outcome => Assert.Contains(Flags.ConflictingSource, outcome.Flags));
    }

    [Fact]
    public void Stream_of_equal_values_from_one_device_is_not_taken_for_copies()
    {
        var slice = new Slice(Enumerable.Range(0, 5).Select(i => Read("v" + i, Kinds.TidalVolumeExpired, 420, i) with { Device = "Device/v" }), null);
        Assert.Equal(5, slice.Of(Kinds.TidalVolumeExpired).Count);
    }
}
