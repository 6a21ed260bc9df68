using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Diffusing capacity that a membrane and a capillary bed have in series.</summary>
/// <remarks>1/DLCO = 1/DM + 1/(θ·Vc) of Roughton and Forster. A model: only by hand, never published.</remarks>
public sealed class DlcoFromMembraneAndCapillary : Definition
{
    private static readonly Slot Membrane = new(MembraneConductanceCo.Value, new Pairing.ByHand());
    private static readonly Slot Theta = new(InverseThetaCo.Value, new Pairing.ByHand());
    private static readonly Slot Volume = new(CapillaryVolume.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dlco-from-membrane-and-capillary", "DLCOmodel", "modelled diffusing capacity for carbon monoxide", "mL/min/mm[Hg]", 1, 80,
        Tolerance.Deviation(0, 0.25, "typical"), [Membrane, Theta, Volume], x => Of(x[Membrane], x[Theta], x[Volume]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "Diffusing capacity for carbon monoxide from membrane conductance and capillary volume.";

    /// <inheritdoc/>
    public override string Equation => "DLCOmodel = 1/(1/DM_CO + inv_theta_CO/Vc)";

    /// <inheritdoc/>
    public override string Assumptions => "Resistances in series. Constants: slope and intercept of one publication, by default Guénard 2016 (0.0062, 1.16); also Forster 1987 (0.0041, 1.3), Roughton and Forster 1957 (0.0058, 1.0), Holland 1969 (0.0065, 1.08). No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. A model, not a measurement. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (15, 40);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CarbonDioxideGates.OneThetaSet with { TrippedBy = [("DM_CO", 73, "mL/min/mm[Hg]"), ("Vc", 76, "mL"), ("PAO2", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("slope", 0.0041, "1"), ("intercept", 1.16, "1")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PAO2"] = Kinds.BreathHoldPo2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Roughton FJW, Forster RE. Relative importance of diffusion and chemical reaction rates in determining rate of exchange of gases in the human lung. J Appl Physiol 1957;11:290 (from memory)"),
        new("Hughes JMB, van der Lee I. The TLNO/TLCO ratio in pulmonary function test interpretation. Eur Respir J 2013;41:453, table (paper from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Hughes and van der Lee 2013, table: 73, 1.31 and 76", 32, 0.5,
            ("DM_CO", 73, "mL/min/mm[Hg]"), ("inv_theta_CO", 1.31, "min.mm[Hg]"), ("Vc", 76, "mL")),
        new(Evidence.Limit, "equal resistances: half of either conductance", 25, 1e-9,
            ("DM_CO", 50, "mL/min/mm[Hg]"), ("inv_theta_CO", 2, "min.mm[Hg]"), ("Vc", 100, "mL")),
    ];

    /// <summary>Membrane conductance in mL/min/mm[Hg], 1/θ in min·mm[Hg], capillary volume in mL.</summary>
    public static double Of(double membrane, double inverseTheta, double volume) => 1 / ((1 / membrane) + (inverseTheta / volume));
}
