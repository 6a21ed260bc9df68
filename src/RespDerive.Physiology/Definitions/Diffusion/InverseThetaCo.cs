using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Resistance of one millilitre of blood to the uptake of carbon monoxide.</summary>
/// <remarks>1/θ = (slope·PO2 + intercept)·14.6/Hb, PO2 in mm[Hg], Hb in g/dL.</remarks>
public sealed class InverseThetaCo : Definition
{
    private static readonly Slot Anchor = new(Kinds.BreathHoldPo2, new Pairing.AnchorItself());
    private static readonly Slot Slope = new(Kinds.ThetaSlope, new Pairing.Site(TimeSpan.Zero));
    private static readonly Slot Intercept = new(Kinds.ThetaIntercept, new Pairing.Site(TimeSpan.Zero));
    private static readonly Slot Haemoglobin = new(Kinds.Hemoglobin, new Pairing.Nearest(TimeSpan.FromHours(24), TimeSpan.FromHours(24)));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("inverse-theta-co", "inv_theta_CO", "inverse of the carbon monoxide uptake of blood", "min.mm[Hg]", 0.4, 10,
        Tolerance.Deviation(0, 0.1, "spread between sets is larger"), [Anchor, Slope, Intercept, Haemoglobin],
        x => Of(x[Slope], x[Intercept], x[Anchor], x[Haemoglobin]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "1/θ for carbon monoxide at an oxygen tension and a haemoglobin.";

    /// <inheritdoc/>
    public override string Equation => "inv_theta_CO = (slope·PAO2 + intercept)·14.6/Hb";

    /// <inheritdoc/>
    public override string Assumptions => "PAO2 of the breath-hold stands for capillary PO2; Hb at most 24 h from the manoeuvre. Constants: slope and intercept of one publication, by default Guénard 2016 (0.0062, 1.16); also Forster 1987 (0.0041, 1.3), Roughton and Forster 1957 (0.0058, 1.0), Holland 1969 (0.0065, 1.08). No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. Depends up to twofold on the set of θ: compare only values of one set. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.8, 4);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.BreathHoldPo2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CarbonDioxideGates.OneThetaSet with { TrippedBy = [("PAO2", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("slope", 0.0041, "1"), ("intercept", 1.16, "1")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PAO2"] = Kinds.BreathHoldPo2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Zavorsky GS et al. Standardisation and application of the single-breath determination of nitric oxide uptake in the lung. Eur Respir J 2017;49:1600962, table of 1/θ", "10.1183/13993003.00962-2016"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "ERS 2017 table, Guénard 2016: PAO2 100, Hb 14.6", 1.78, 0.0006,
            ("PAO2bh", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("slope", 0.0062, "1"), ("intercept", 1.16, "1")),
        new(Evidence.Published, "ERS 2017 table, Forster 1987: Hb 13.4", 1.863, 0.001,
            ("PAO2bh", 100, "mm[Hg]"), ("Hb", 13.4, "g/dL"), ("slope", 0.0041, "1"), ("intercept", 1.3, "1")),
        new(Evidence.Published, "ERS 2017 table, Roughton and Forster 1957: Hb 13.4", 1.721, 0.001,
            ("PAO2bh", 100, "mm[Hg]"), ("Hb", 13.4, "g/dL"), ("slope", 0.0058, "1"), ("intercept", 1, "1")),
        new(Evidence.Published, "ERS 2017 table, Holland 1969: Hb 14.6", 1.73, 0.0006,
            ("PAO2bh", 100, "mm[Hg]"), ("Hb", 14.6, "g/dL"), ("slope", 0.0065, "1"), ("intercept", 1.08, "1")),
    ];

    /// <summary>Slope per mm[Hg], intercept, oxygen tension in mm[Hg], haemoglobin in g/dL.</summary>
    public static double Of(double slope, double intercept, double po2, double haemoglobin) => ((slope * po2) + intercept) * 14.6 / haemoglobin;
}
