using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen saturation that goes with a tension on the Dash curve.</summary>
/// <remarks>
/// S = r/(1 + r), r = (PO2/P50)^n, n = 2.82 − 1.20·10^(−PO2/29.25), with the P50 of the same model; tensions in mm[Hg].
/// </remarks>
public sealed class So2Dash : Definition
{
    private static readonly Slot Misfit = new Slot(Kinds.DashMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("so2-dash", "SO2dash", "oxygen saturation by the Dash curve", "%", 0, 100,
        Tolerance.Deviation(1, 0, "typical"), [BloodSlots.Tension, new Slot(P50Dash.Value, new Pairing.SameSample()), Misfit],
        x => Of(x[BloodSlots.Tension], x[P50Dash.Value]) + x[Misfit]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen saturation calculated from tension, pH, carbon dioxide tension, 2,3-DPG and temperature (Dash 2016).";

    /// <inheritdoc/>
    public override string Equation => "SO2dash = 100·r/(1 + r), r = (PO2/P50dash)^n, n = 2.82 − 1.20·10^(−PO2/29.25)";

    /// <inheritdoc/>
    public override string Assumptions => "Adult haemoglobin without carboxy- or methaemoglobin. Against table 1 of Severinghaus 1979 it is up to 0.61 % off (at 36 mm[Hg]), which is in the uncertainty.";

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
        new("Dash RK, Korman B, Bassingthwaighte JB. Simple accurate mathematical models of blood HbO2 and HbCO2 dissociation curves at varied physiological conditions. Eur J Appl Physiol 2016;116:97"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "one half at P50", 50, 1e-9, ("PO2", 26.8, "mm[Hg]"), ("pH_plasma", 7.4, "[pH]"), ("PCO2", 40, "mm[Hg]"), ("DPG", 4.65, "mmol/L"), ("temp", 37, "Cel")),
        new(Evidence.Published, "table 1 of Severinghaus 1979, 60 mm[Hg], within the misfit stated", 90.85, 0.61, ("PO2", 60, "mm[Hg]"), ("pH", 7.4, "[pH]"), ("PCO2", 40, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["pH_plasma"] = Kinds.PhArterial, ["temp"] = Kinds.GasTemperature };

    /// <summary>Tensions in mm[Hg]; result in percent.</summary>
    public static double Of(double tension, double p50)
    {
        var r = Math.Pow(tension / p50, 2.82 - (1.20 * Math.Pow(10, -tension / 29.25)));
        return 100 * r / (1 + r);
    }
}
