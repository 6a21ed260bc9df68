using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen tension that goes with a saturation: the exact inverse of the Severinghaus curve.</summary>
/// <remarks>
/// q = 11700/(1/S − 1), P = ∛(q + √(q² + 50³)) − ∛(√(q² + 50³) − q), S a fraction, P in mm[Hg] at pH 7.40 and 37 °C.
/// Above S 0.97 the curve is too flat to be inverted.
/// </remarks>
public sealed class PO2FromSO2Ellis : Definition
{
    private static readonly Slot Saturation = new(Kinds.So2, new Pairing.ByHand());

    private static readonly Slot Misfit = new Slot(Kinds.SeveringhausMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("po2-from-so2-ellis", "PO2ellis", "oxygen tension from saturation, exact inverse", "mm[Hg]", 3, 150,
        Tolerance.Deviation(0, 0.15, "typical at a saturation of 92 %"), [Saturation, Misfit], x => Of((x[Saturation] - x[Misfit]) / 100));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen tension from a saturation, by the exact inverse of the Severinghaus curve (Ellis 1989).";

    /// <inheritdoc/>
    public override string Equation => "PO2ellis = ∛(q + √(q² + 50³)) − ∛(√(q² + 50³) − q), q = 11700/(1/S − 1)";

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
        new("Ellis RK. Determination of PO2 from saturation. J Appl Physiol 1989;67:902"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "round trip: 60 mm[Hg] gives 225000/248400", 60, 1e-9, ("SO2", 0.9057971014492753, "1")),
    ];

    /// <summary>Saturation as a fraction; result in mm[Hg].</summary>
    public static double Of(double saturation) => SeveringhausCurve.Tension(saturation);
}
