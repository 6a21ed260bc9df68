using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen saturation that goes with a tension on the standard curve of Siggaard-Andersen.</summary>
/// <remarks>
/// ln(s/(1 − s)) = 1.875 + (x − 1.946) + 3.5·tanh(0.5343·(x − 1.946)), x = ln(PO2 in kPa).
/// Standard conditions only; a second curve to hold the others against.
/// </remarks>
public sealed class So2SiggaardAndersen : Definition
{
    private static readonly Slot Misfit = new Slot(Kinds.SiggaardAndersenMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("so2-siggaard-andersen", "SO2siggaard", "oxygen saturation by the Siggaard-Andersen curve", "%", 0, 100,
        Tolerance.Deviation(1, 0, "typical"), [BloodSlots.Tension, Misfit], x => Of(x[BloodSlots.Tension]) + x[Misfit]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen saturation calculated from tension at pH 7.40 and 37 °C (Siggaard-Andersen 1984).";

    /// <inheritdoc/>
    public override string Equation => "SO2siggaard = 100/(1 + exp(−y)), y = 1.875 + (x − 1.946) + 3.5·tanh(0.5343·(x − 1.946)), x = ln(PO2·0.133322)";

    /// <inheritdoc/>
    public override string Assumptions => "pH 7.40, 37 °C, PCO2 40 mm[Hg]; adult haemoglobin. Against table 1 of Severinghaus 1979 it is within 0.42 %, which is in the uncertainty.";

    /// <inheritdoc/>
    public override string Caution => "An estimate, not a measurement: a shifted curve of the patient (fetal or abnormal haemoglobin, 2,3-DPG) and carboxy- or methaemoglobin are not seen. A measured saturation is always preferred.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (70, 100);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Siggaard-Andersen O et al. A mathematical model of the hemoglobin-oxygen dissociation curve of human blood and of the oxygen partial pressure as a function of temperature. Clin Chem 1984;30:1646, abstract"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "at x = 1.946 the curve is 1/(1 + exp(−1.875))", 86.70357598021707, 1e-6, ("PO2", 7.0006289848698255, "kPa")),
        new(Evidence.Published, "table 1 of Severinghaus 1979, 40 mm[Hg], within the misfit stated", 74.69, 0.42, ("PO2", 40, "mm[Hg]")),
    ];

    /// <summary>Tension in mm[Hg]; result in percent.</summary>
    public static double Of(double tension)
    {
        var x = Math.Log(tension * 0.133322) - 1.946;
        return 100 / (1 + Math.Exp(-(1.875 + x + (3.5 * Math.Tanh(0.5343 * x)))));
    }
}
