using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

public sealed class MechanicsPairingTests
{
    private static readonly Reading Plateau = Read("plat", Kinds.Plateau, 25, 60);

    private static Outcome One(string definition, params Reading[] readings) => Assert.Single(Evaluate(definition, readings));

    [Fact]
    public void Total_peep_wins_over_set_peep()
    {
        var outcome = One("driving-pressure", Plateau, Read("set", Kinds.PeepSet, 5, 10), Read("tot", Kinds.PeepTotal, 10, 62));
        Assert.Equal(15.0m, outcome.Published);
        Assert.DoesNotContain(Flags.PeepNotTotal, outcome.Flags);
    }

    [Fact]
    public void Set_plus_intrinsic_peep_is_total_peep()
    {
        var outcome = One("driving-pressure", Plateau, Read("set", Kinds.PeepSet, 5, 10), Read("int", Kinds.PeepIntrinsic, 5, 58));
        Assert.Equal(15.0m, outcome.Published);
        Assert.DoesNotContain(Flags.PeepNotTotal, outcome.Flags);
    }

    [Fact]
    public void Set_peep_alone_is_published_with_its_flag_and_variant()
    {
        var outcome = One("driving-pressure", Plateau, Read("set", Kinds.PeepSet, 5, 10));
        Assert.Equal(20.0m, outcome.Published);
        Assert.Contains(Flags.PeepNotTotal, outcome.Flags);
        Assert.Equal("peep-not-total", outcome.Variant);
    }

    [Fact]
    public void Policy_may_withhold_set_peep() =>
        Assert.Equal(Withheld.NoPeepTotal, Assert.Single(Evaluate("driving-pressure", null, SeaLevel with { AcceptSetPeep = false }, Plateau, Read("set", Kinds.PeepSet, 5, 10))).Withheld);

    [Theory]
    [InlineData("spontaneous rate", Withheld.PatientNotPassive)]
    [InlineData("triggered", Withheld.PatientNotPassive)]
    [InlineData("spontaneous mode", Withheld.PatientNotPassive)]
    [InlineData("support only", Withheld.PatientNotPassive)]
    [InlineData("passive", null)]
    public void Evidence_of_effort_withholds(string evidence, string? withheld)
    {
        Reading[] extra = evidence switch
        {
            "spontaneous rate" => [Read("e", Kinds.RateSpontaneous, 4, 62)],
            "triggered" => [Read("e", Kinds.RateSet, 16, 10), Read("e2", Kinds.RateTotal, 18, 59)],
            "spontaneous mode" => [Read("e", Kinds.Mode, 2, 10)],
            "support only" => [Read("e", Kinds.PressureSupportSet, 10, 10)],
            _ => [Read("e", Kinds.RateSet, 16, 10), Read("e2", Kinds.RateTotal, 17, 59)],
        };
        var outcome = One("driving-pressure", [Plateau, Read("tot", Kinds.PeepTotal, 10, 60), .. extra]);
        Assert.Equal(withheld, outcome.Withheld);
        Assert.DoesNotContain(Flags.PassivityUnconfirmed, outcome.Flags);
    }

    [Fact]
    public void No_evidence_either_way_is_flagged() =>
        Assert.Contains(Flags.PassivityUnconfirmed, One("driving-pressure", Plateau, Read("tot", Kinds.PeepTotal, 10, 60)).Flags);

    [Fact]
    public void Tidal_volume_of_the_same_device_within_a_minute_wins_over_a_nearer_stranger()
    {
        var plateau = Plateau with { Device = "Device/v" };
        var outcome = One("static-compliance", plateau, Read("tot", Kinds.PeepTotal, 10, 60),
            Read("own", Kinds.TidalVolumeExpired, 450, 60.9) with { Device = "Device/v" }, Read("other", Kinds.TidalVolumeExpired, 300, 60.1) with { Device = "Device/w" });
        Assert.Equal(30.0m, outcome.Published);
    }

    [Fact]
    public void Readings_of_one_device_share_its_zero_offset()
    {
        Reading peep = Read("tot", Kinds.PeepTotal, 10, 60);
        var apart = One("driving-pressure", Plateau, peep);
        var together = One("driving-pressure", Plateau with { Device = "Device/v" }, peep with { Device = "Device/v" });
        Assert.True(together.Uncertainty < apart.Uncertainty / 2);
    }

    [Fact]
    public void Mean_airway_pressure_is_the_median_and_every_reading_is_named()
    {
        Reading[] means = [.. new[] { 14.0, 15, 40 }.Select((value, i) => Read("m" + i, Kinds.MeanAirway, value, 58 + i) with { Device = "Device/v" })];
        var outcome = One("oxygenation-index", [Read("gas", Kinds.PaO2, 60, 60), Read("f", Kinds.FiO2Set, 0.6, 10), .. means]);
        Assert.Equal(15.0m, outcome.Published);
        Assert.Equal(3, outcome.Inputs.Single(input => input.Kind == "mean-airway-pressure").Readings.Count);
    }

    [Fact]
    public void Stream_calls_once_in_a_quarter_of_an_hour_and_the_quarter_is_the_identity()
    {
        Reading Breath(string id, double minute) => Read(id, Kinds.TidalVolumeExpired, 420, minute) with { Streamed = true, Device = "Device/v" };
        Reading height = Read("h", Kinds.Height, 175, -600);
        var person = Adult();
        var outcomes = Evaluate("tidal-volume-per-pbw", person, SeaLevel, height, Breath("a", 3), Breath("b", 9), Breath("c", 16));
        Assert.Equal(["a", "c"], outcomes.Select(outcome => outcome.Anchor.Resource.Id));
        var withEarlier = Evaluate("tidal-volume-per-pbw", person, SeaLevel, height, Breath("a", 3), Breath("b", 9), Breath("c", 16), Breath("earlier", 1));
        Assert.Equal("earlier", withEarlier[0].Anchor.Resource.Id);
        Assert.Equal(outcomes[0].Identity, withEarlier[0].Identity);
    }

    [Fact]
    public void Predicted_weight_needs_a_known_sex_and_an_adult()
    {
        Reading height = Read("h", Kinds.Height, 175, 0);
        Assert.Equal(70.6m, Assert.Single(Evaluate("predicted-body-weight", Adult(), SeaLevel, height)).Published);
        Assert.Equal(Withheld.SexUnknown, Assert.Single(Evaluate("predicted-body-weight", null, SeaLevel, height)).Withheld);
        Assert.Equal(Withheld.AgeOutOfRange, Assert.Single(Evaluate("predicted-body-weight", Adult() with { BirthDate = "2012" }, SeaLevel, height)).Withheld);
        Assert.Contains(Flags.AgeUnconfirmed, Assert.Single(Evaluate("predicted-body-weight", Adult() with { BirthDate = "2008" }, SeaLevel, height)).Flags);
        Assert.Contains(Flags.AgeUnconfirmed, Assert.Single(Evaluate("predicted-body-weight", Adult() with { BirthDate = null }, SeaLevel, height)).Flags);
    }
}
