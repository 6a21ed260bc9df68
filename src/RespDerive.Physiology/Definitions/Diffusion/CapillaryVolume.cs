using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Volume of blood in the pulmonary capillaries.</summary>
/// <remarks>Vc = (1/θ)/(1/(θ·Vc)) of Roughton and Forster; the denominator comes from two oxygen levels or from a second gas.</remarks>
public sealed class CapillaryVolume : Definition
{
    private static readonly Slot Theta = new(InverseThetaCo.Value, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(2)));
    private static readonly Slot Anchor = new(Kinds.InverseThetaVc, new Pairing.AnchorItself());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("capillary-volume", "Vc", "pulmonary capillary blood volume", "mL", 5, 300,
        Tolerance.Deviation(0, 0.25, "typical"), [Theta, Anchor], x => Of(x[Theta], x[Anchor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "Pulmonary capillary blood volume from the uptake resistances of blood.";

    /// <inheritdoc/>
    public override string Equation => "Vc = inv_theta_CO/inv_thetaVc";

    /// <inheritdoc/>
    public override string Assumptions => "As for 1/θ. Constants: slope and intercept of one publication, by default Guénard 2016 (0.0062, 1.16); also Forster 1987 (0.0041, 1.3), Roughton and Forster 1957 (0.0058, 1.0), Holland 1969 (0.0065, 1.08). Withheld above a relative uncertainty of 30 %. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. Depends up to twofold on the set of θ: compare only values of one set. The two-point solution is unstable. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (50, 110);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.InverseThetaVc]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CarbonDioxideGates.OneThetaSet with { TrippedBy = [("PAO2", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("slope", 0.0041, "1"), ("intercept", 1.16, "1"), ("inv_thetaVc", 0.0173, "min.mm[Hg]/mL")] },
    ];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.30;

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
        new(Evidence.Published, "Hughes and van der Lee 2013, table: 1/θ 1.31", 76, 0.7,
            ("inv_theta_CO", 1.31, "min.mm[Hg]"), ("inv_thetaVc", 0.0173, "min.mm[Hg]/mL")),
        new(Evidence.Published, "Hughes and van der Lee 2013, table: 1/θ 1.71", 76, 0.7,
            ("inv_theta_CO", 1.71, "min.mm[Hg]"), ("inv_thetaVc", 0.0224, "min.mm[Hg]/mL")),
        new(Evidence.Limit, "exact on paper: 1.78/0.0178 with Guénard's 1/θ at 100 mm[Hg] and 14.6 g/dL", 100, 1e-9,
            ("PAO2bh", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("inv_thetaVc", 0.0178, "min.mm[Hg]/mL")),
    ];

    /// <summary>1/θ in min·mm[Hg], 1/(θ·Vc) in min·mm[Hg]/mL.</summary>
    public static double Of(double inverseTheta, double inverseThetaVc) => inverseTheta / inverseThetaVc;
}
