using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>What must be known before two pressures and a flow are a resistance.</summary>
public sealed class AirwayResistanceTests
{
    private static readonly double VolumeControl = Kinds.Mode.Codes.ToList().IndexOf("volume control");

    private static Root[] Breath => [new(Kinds.Plateau, 22), new(Kinds.Peak, 28), new(Kinds.FlowSet, 45)];

    [Fact]
    public void Without_a_mode_the_flow_is_not_known_to_be_constant()
    {
        Assert.Equal(Withheld.FlowNotConstant, Of(Breath).Withheld);
        Assert.Equal(8, Of([.. Breath, new(Kinds.Mode, VolumeControl)]).Value, 1e-9);
    }

    [Fact]
    public void Without_a_set_flow_the_flow_is_not_known_to_be_constant() =>
        Assert.Equal(Withheld.FlowNotConstant, Of([.. Breath.Where(root => root.Kind != Kinds.FlowSet), new(Kinds.Mode, VolumeControl)]).Withheld);

    [Theory]
    [InlineData("pressure control")]
    [InlineData("spontaneous")]
    [InlineData("other")]
    [InlineData("unknown")]
    public void Any_other_mode_withholds(string mode) =>
        Assert.Equal(Withheld.FlowNotConstant, Of([.. Breath, new(Kinds.Mode, Kinds.Mode.Codes.ToList().IndexOf(mode))]).Withheld);

    [Fact]
    public void A_constant_waveform_alone_proves_nothing_and_a_decelerating_one_withholds_in_any_mode()
    {
        Assert.Equal(Withheld.FlowNotConstant, Of([.. Breath, new(Kinds.Waveform, 0)]).Withheld);
        Assert.Equal(Withheld.FlowNotConstant, Of([.. Breath, new(Kinds.Mode, VolumeControl), new(Kinds.Waveform, 1)]).Withheld);
    }

    [Fact]
    public void By_hand_volume_control_is_taken_on_trust_and_named()
    {
        var computed = ByHand.Compute(CatalogueData.Of("airway-resistance"), [("Ppeak", 28, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 0.75, "L/s")]);
        Assert.Equal(8, computed.Computation.Value, 1e-9);
        Assert.Equal([Kinds.ModeTaken], computed.Inputs.Where(input => input.Assumed).Select(input => input.Kind));
        Assert.Contains(Flags.ModeUnconfirmed, computed.Computation.Flags);
    }

    [Fact]
    public void A_peak_below_the_plateau_withholds() => Assert.Equal(Withheld.Impossible,
        Of([new(Kinds.Plateau, 22), new(Kinds.Peak, 21.5), new(Kinds.FlowSet, 45), new(Kinds.Mode, VolumeControl)]).Withheld);

    /// <summary>Sums on paper (JCGM 100:2008, 5.1.2): the ±2 cm[H2O] of the transducer cancels, ±4 % of each reading and ±10 % of the flow stay.</summary>
    [Fact]
    public void Peak_and_plateau_share_the_offset_of_their_transducer()
    {
        var expected = 8 * Math.Sqrt((Math.Pow(0.04 * 28, 2) + Math.Pow(0.04 * 22, 2)) / 3 / 36 + (0.01 / 3));
        Assert.Equal(expected, Of([.. Breath, new(Kinds.Mode, VolumeControl)]).Uncertainty, 1e-6);
        Assert.Equal(expected, Of([.. Breath.Select(root => root with { Transducer = "vent" }), new(Kinds.Mode, VolumeControl)]).Uncertainty, 1e-6);
    }

    [Fact]
    public void A_drop_between_two_devices_is_none() => Assert.Equal(Withheld.InputMissing,
        Of([new(Kinds.Plateau, 22, "a"), new(Kinds.Peak, 28, "b"), new(Kinds.FlowSet, 45), new(Kinds.Mode, VolumeControl)]).Withheld);

    private static Computation Of(Root[] roots) => Computation.Of(CatalogueData.Of("airway-resistance"), new Roots(roots));
}
