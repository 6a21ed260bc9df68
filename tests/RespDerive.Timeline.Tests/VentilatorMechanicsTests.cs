using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

/// <summary>Values that hold in one way of ventilating only: from the record nothing about it is taken on trust.</summary>
public sealed class VentilatorMechanicsTests
{
    private static readonly Reading Plateau = Read("plat", Kinds.Plateau, 20, 60);
    private static readonly Reading Peak = Read("peak", Kinds.Peak, 25, 60.5);
    private static readonly Reading Flow = Read("flow", Kinds.FlowSet, 30, 10);
    private static readonly Reading Volume = Read("vt", Kinds.TidalVolumeExpired, 500, 60);
    private static readonly Reading Rate = Read("rr", Kinds.RateTotal, 20, 60);
    private static readonly Reading Peep = Read("peep", Kinds.PeepTotal, 5, 60);

    private static Reading Mode(string mode) => Read("mode", Kinds.Mode, Kinds.Mode.Codes.ToList().IndexOf(mode), 5);

    /// <summary>The one outcome at a site that names the definition, so that lesser variants run too.</summary>
    private static Outcome One(string definition, params Reading[] readings) => Assert.Single(Evaluate(definition, null, SeaLevel with { Definitions = [Catalogue.Shipped.Find(definition)!.Key] }, readings));

    [Fact]
    public void Resistance_rests_on_two_pressures_a_set_flow_and_a_mode_that_controls_volume()
    {
        var outcome = One("airway-resistance", Plateau, Peak, Flow, Mode("volume control"));
        Assert.Equal(10.0m, outcome.Published);
        Assert.Equal(["plateau-pressure", "peak-inspiratory-pressure", "inspiratory-flow-set", "ventilator-mode"], outcome.Inputs.Where(input => !input.GateOnly).Select(input => input.Kind));
        Assert.DoesNotContain(outcome.Inputs, input => input.Assumed);
    }

    [Theory]
    [InlineData("pressure control")]
    [InlineData("other")]
    [InlineData(null)]
    public void Resistance_is_withheld_without_proof_of_constant_flow(string? mode) =>
        Assert.Equal(Withheld.FlowNotConstant, One("airway-resistance", [Plateau, Peak, Flow, .. mode is null ? (Reading[])[] : [Mode(mode)]]).Withheld);

    [Fact]
    public void Resistance_is_withheld_without_a_set_flow_and_with_one_that_came_later()
    {
        Assert.Equal(Withheld.FlowNotConstant, One("airway-resistance", Plateau, Peak, Mode("volume control")).Withheld);
        Assert.Equal(Withheld.FlowNotConstant, One("airway-resistance", Plateau, Peak, Flow with { At = Morning.AddMinutes(61) }, Mode("volume control")).Withheld);
    }

    [Fact]
    public void A_peak_of_more_than_a_minute_away_or_of_another_device_is_none()
    {
        Assert.Equal(Withheld.InputMissing, One("airway-resistance", Plateau, Peak with { At = Morning.AddMinutes(61.5) }, Flow, Mode("volume control")).Withheld);
        Assert.Equal(Withheld.InputMissing, One("airway-resistance", Plateau with { Device = "Device/v" }, Peak with { Device = "Device/w" }, Flow, Mode("volume control")).Withheld);
    }

    [Fact]
    public void Mechanical_power_in_volume_control_is_the_same_by_both_forms()
    {
        Reading[] breath = [Plateau, Peak, Volume, Rate, Peep, Flow, Read("ie", Kinds.IeRatio, 0.5, 60), Mode("volume control")];
        Assert.Equal(17.15, One("mechanical-power-vcv-simplified", breath).Value!.Value, 1e-9);
        Assert.Equal(17.15, One("mechanical-power-vcv", breath).Value!.Value, 1e-9);
        Assert.Contains(One("mechanical-power-vcv", breath).Inputs, input => input is { Kind: "work-factor", Assumed: true, Value: 0.098 });
    }

    [Theory]
    [InlineData("pressure control")]
    [InlineData("unknown")]
    [InlineData(null)]
    public void Mechanical_power_is_withheld_in_a_mode_its_formula_is_not_for(string? mode) => Assert.Equal(Withheld.WrongMode,
        One("mechanical-power-vcv-simplified", [Plateau, Peak, Volume, Rate, Peep, .. mode is null ? (Reading[])[] : [Mode(mode)]]).Withheld);

    [Fact]
    public void Mechanical_power_in_pressure_control_is_called_for_where_a_pressure_is_set()
    {
        Reading[] breath = [Read("vt", Kinds.TidalVolumeExpired, 400, 60), Rate, Read("peep", Kinds.PeepSet, 10, 5), Mode("pressure control")];
        Assert.Empty(Evaluate("mechanical-power-pcv-simplified", breath));
        Assert.Equal(19.6m, One("mechanical-power-pcv-simplified", [.. breath, Read("dp", Kinds.InspiratoryPressureAbovePeep, 15, 5)]).Published);
    }

    [Fact]
    public void The_index_of_rapid_shallow_breathing_needs_a_spontaneous_mode_and_names_support()
    {
        Reading[] breath = [Read("vt", Kinds.TidalVolumeExpired, 250, 60), Read("rr", Kinds.RateTotal, 25, 61)];
        Assert.Empty(Evaluate("rsbi", breath));
        Assert.Equal(Withheld.NotSpontaneous, One("rsbi", [.. breath, Mode("volume control")]).Withheld);
        Assert.Equal(100m, One("rsbi", [.. breath, Mode("spontaneous")]).Published);
        Assert.DoesNotContain(Flags.OnPressureSupport, One("rsbi", [.. breath, Mode("spontaneous"), Read("ps", Kinds.PressureSupportSet, 0, 5)]).Flags);
        Assert.Contains(Flags.OnPressureSupport, One("rsbi", [.. breath, Mode("spontaneous"), Read("ps", Kinds.PressureSupportSet, 8, 5)]).Flags);
    }

    [Fact]
    public void Pressures_across_the_lung_are_called_for_only_with_a_balloon_in_place()
    {
        Reading[] hold = [Read("plat", Kinds.Plateau, 30, 60), Read("peep", Kinds.PeepTotal, 10, 60), Read("vt", Kinds.TidalVolumeExpired, 400, 60)];
        Reading[] balloon = [Read("ei", Kinds.EsophagealEndInspiratory, 18, 60), Read("ee", Kinds.EsophagealEndExpiratory, 12, 59)];
        Assert.Empty(Evaluate("transpulmonary-driving-pressure", hold));
        Assert.Equal(14m, One("transpulmonary-driving-pressure", [.. hold, .. balloon]).Published);
        Assert.Equal(15m, One("elastance-chest-wall", [.. hold, .. balloon]).Published);
        Assert.Equal(35m, One("elastance-lung", [.. hold, .. balloon]).Published);
        Assert.Equal(0.7m, One("elastance-ratio", [.. hold, .. balloon]).Published);
        Assert.Equal(21m, One("lung-stress", [.. hold, .. balloon]).Published);
    }

    [Fact]
    public void Models_and_targets_are_never_called_for() => Assert.All(
        Catalogue.Shipped.All.Where(definition => definition.ByHandOnly),
        definition => Assert.Empty(Evaluate(definition.Key, null, SeaLevel with { Definitions = [definition.Key] }, Plateau, Peak, Volume, Rate, Peep, Flow, Mode("volume control"), Read("vd", Kinds.DeadSpaceVolume, 150, 60))));
}
