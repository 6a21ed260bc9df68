using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen saturation that goes with a tension on the Kelman curve.</summary>
/// <remarks>
/// S = (x⁴ + a3·x³ + a2·x² + a1·x)/(x⁴ + a7·x³ + a6·x² + a5·x + a4) with x the virtual tension, times 26.8/P50 for blood of another P50;
/// a1…a7 = −8532.2289, 2121.4010, −67.073989, 935960.87, −31346.258, 2396.1674, −67.104406.
/// Below 10 mm[Hg], where the ratio fails, S = 0.003683·x + 0.000584·x².
/// </remarks>
public sealed class So2Kelman : Definition
{
    private static readonly Slot HalfSaturation = new Slot(Kinds.KelmanP50, new Pairing.Site(TimeSpan.Zero));

    private static readonly Slot Misfit = new Slot(Kinds.KelmanMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("so2-kelman", "SO2kelman", "oxygen saturation by the Kelman curve", "%", 0, 100,
        Tolerance.Deviation(1, 0, "typical"), [new Slot(KelmanVirtualPo2.Value, new Pairing.SameSample()), HalfSaturation, Misfit],
        x => Of(x[KelmanVirtualPo2.Value] * 26.8 / x[HalfSaturation]) + x[Misfit]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen saturation calculated from tension, pH, carbon dioxide tension and temperature (Kelman 1966).";

    /// <inheritdoc/>
    public override string Equation => "SO2kelman = 100·(x⁴ − 67.073989·x³ + 2121.4010·x² − 8532.2289·x)/(x⁴ − 67.104406·x³ + 2396.1674·x² − 31346.258·x + 935960.87), x = xKelman·26.8/P50; below x = 10: 100·(0.003683·x + 0.000584·x²)";

    /// <inheritdoc/>
    public override string Assumptions => "Adult haemoglobin without carboxy- or methaemoglobin. Against table 1 of Severinghaus 1979 it is 2.2 % too high at 18 mm[Hg] and within 0.3 % above 50 mm[Hg]; the latter is in the uncertainty.";

    /// <inheritdoc/>
    public override string Caution => "An estimate, not a measurement: a shifted curve of the patient (fetal or abnormal haemoglobin, 2,3-DPG) and carboxy- or methaemoglobin are not seen. A measured saturation is always preferred.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (70, 100);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Kelman GR. Digital computer subroutine for the conversion of oxygen tension into saturation. J Appl Physiol 1966;21:1375"),
        new("Form below 10 mm[Hg] and scaling by P50: a university P50 program in public source (Kelman routine)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "test of a public blood-gas package: 10 kPa, 37 °C", 95.0795, 1e-4, ("PO2", 10, "kPa"), ("temp", 37, "Cel"), ("pH", 7.4, "[pH]"), ("PCO2", 5.3329, "kPa")),
        new(Evidence.Published, "printed output of a university P50 program (Kelman routine), sample 46 / 30.7 / 7.38, P50 26.2", 82.42, 0.006, ("PO2", 46, "mm[Hg]"), ("PCO2", 30.7, "mm[Hg]"), ("pH", 7.38, "[pH]"), ("temp", 37, "Cel"), ("P50", 26.2, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["temp"] = Kinds.GasTemperature, ["P50"] = Kinds.KelmanP50 };

    /// <summary>Virtual tension in mm[Hg] on the curve of P50 26.8; result in percent.</summary>
    public static double Of(double x)
    {
        if (x < 10)
        {
            return 100 * ((0.003683 * x) + (0.000584 * x * x));
        }

        var over = ((((((x - 67.073989) * x) + 2121.4010) * x) - 8532.2289) * x);
        var under = ((((((x - 67.104406) * x) + 2396.1674) * x) - 31346.258) * x) + 935960.87;
        return 100 * over / under;
    }
}
