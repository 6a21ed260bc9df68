using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen tension that goes with a saturation, by equation 2 of Severinghaus.</summary>
/// <remarks>
/// ln P = 0.385·ln(1/(1/S − 1)) + 3.32 − 1/(72·S) − S⁶/6, S a fraction, P in mm[Hg] at pH 7.40 and 37 °C.
/// Above S 0.97 the curve is too flat to be inverted.
/// </remarks>
public sealed class PO2FromSO2SeveringhausEq2 : Definition
{
    private static readonly Slot Saturation = new(Kinds.So2, new Pairing.ByHand());

    private static readonly Slot Misfit = new Slot(Kinds.SeveringhausMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("po2-from-so2-severinghaus-eq2", "PO2eq2", "oxygen tension from saturation, Severinghaus equation 2", "mm[Hg]", 3, 150,
        Tolerance.Deviation(0, 0.15, "typical at a saturation of 92 %"), [Saturation, Misfit], x => Of((x[Saturation] - x[Misfit]) / 100));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen tension from a saturation by the approximate inverse of Severinghaus 1979; the exact inverse is preferred.";

    /// <inheritdoc/>
    public override string Equation => "PO2eq2 = exp(0.385·ln(1/(1/S − 1)) + 3.32 − 1/(72·S) − S⁶/6)";

    /// <inheritdoc/>
    public override string Assumptions => "Saturation of 5 to 97 %; pH 7.40, 37 °C, adult haemoglobin. The misfit of the curve, 0.55 % saturation, is in the uncertainty.";

    /// <inheritdoc/>
    public override string Caution => "An estimate that grows uncertain fast above 92 %; never in place of a measured tension.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (25, 95);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.Spo2Above97, "the saturation is above 97 %", [], x => x.Has(Saturation) && x[Saturation] > 97, ("SO2", 98, "%")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Severinghaus JW. Simple, accurate equations for human blood O2 dissociation computations. J Appl Physiol 1979;46:599, equation 2"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "documented example of a public blood-gas package: S 0.85", 49.83, 0.005, ("SO2", 0.85, "1")),
        new(Evidence.Published, "table 1 of Severinghaus 1979: 50 mm[Hg] at 85.08 %", 50, 0.5, ("SO2", 85.08, "%")),
    ];

    /// <summary>Saturation as a fraction; result in mm[Hg].</summary>
    public static double Of(double saturation) =>
        Math.Exp((0.385 * Math.Log(1 / ((1 / saturation) - 1))) + 3.32 - (1 / (72 * saturation)) - (Math.Pow(saturation, 6) / 6));
}
