using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tension of half saturation of the blood of one sample.</summary>
/// <remarks>
/// P50 = P50std·P/Pstd(S): P the measured tension brought to pH 7.40 and 37 °C (Severinghaus), Pstd(S) the tension of the standard curve
/// at the measured saturation (Ellis), P50std the half-saturation tension of that curve. By hand also the P50 of a named curve itself.
/// </remarks>
public sealed class P50 : Definition
{
    private static readonly Slot Saturation = new("oxygen saturation", [new Option(Kinds.SaO2, new Pairing.SameSample()), new Option(Kinds.So2, new Pairing.ByHand())]);

    private static readonly Slot StandardP50 = new Slot(Kinds.StandardP50, new Pairing.Site(TimeSpan.Zero));

    private static readonly Slot Misfit = new Slot(Kinds.SeveringhausMisfit, new Pairing.Site(TimeSpan.Zero));

    private static readonly Slot Curve = new(Kinds.DissociationCurve, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("p50", "P50", "half-saturation tension of the blood", "mm[Hg]", 10, 60,
        Tolerance.Deviation(1, 0, "typical"), [BloodSlots.Tension, BloodSlots.Ph, BloodSlots.Temperature, Saturation, StandardP50, Misfit], Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Half-saturation tension from the measured tension and saturation of one sample (single-point P50).";

    /// <inheritdoc/>
    public override string Equation => "P50 = P50std·P/Pstd(S), P = PO2 at pH 7.40 and 37 °C, Pstd the inverse of the Severinghaus curve";

    /// <inheritdoc/>
    public override string Assumptions => "Measured, not calculated saturation between 30 and 90 %; adult shape of the curve; tension and saturation of one sample. P50std is that of the curve itself, 26.86 mm[Hg], unless given.";

    /// <inheritdoc/>
    public override string Caution => "Meaningless with a saturation the analyser calculated itself. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (24, 29);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Slot> ByIdentity => [Curve, Misfit];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.SaturationOutOfRange, "the saturation is below 30 or above 90 %", [], x => x.Has(Saturation) && x[Saturation] is < 30 or > 90,
            ("PO2", 90, "mm[Hg]"), ("SO2", 97, "%"), ("pH", 7.4, "[pH]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Severinghaus JW. Simple, accurate equations for human blood O2 dissociation computations. J Appl Physiol 1979;46:599, equations 1, 3 and 4"),
        new("Ellis RK. Determination of PO2 from saturation. J Appl Physiol 1989;67:902"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "at half saturation and standard conditions the tension itself is the P50", 29, 1e-9, ("PO2", 29, "mm[Hg]"), ("SO2", 50, "%"), ("pH", 7.4, "[pH]"), ("temp", 37, "Cel")),
        new(Evidence.Limit, "a sample on the standard curve gives P50std back: 40³ + 150·40 = 70000, and 70000/93400", 26.6, 1e-6, ("PO2", 40, "mm[Hg]"), ("SO2", 0.7494646680942184, "1"), ("P50std", 26.6, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["temp"] = Kinds.GasTemperature };

    /// <summary>Tensions in mm[Hg], temperature in °C, saturation as a fraction.</summary>
    public static double Of(double tension, double ph, double celsius, double saturation, double standard) =>
        standard * SeveringhausCurve.Standard(tension, ph, celsius) / SeveringhausCurve.Tension(saturation);

    private static double Compute(Roots x) => Value.ComputableFrom(x)
        ? Of(x[BloodSlots.Tension], x[BloodSlots.Ph], x[BloodSlots.Temperature], (x[Saturation] - x[Misfit]) / 100, x[StandardP50])
        : SeveringhausCurve.Tension(0.5 - (x[Misfit] / 100));
}
