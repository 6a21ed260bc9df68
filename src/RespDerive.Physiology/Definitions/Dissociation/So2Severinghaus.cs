using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen saturation that goes with a tension on the standard curve of Severinghaus.</summary>
/// <remarks>
/// S = 1/(23400/(P³ + 150·P) + 1), P the tension in mm[Hg] brought to pH 7.40 and 37 °C by
/// Δln P = (T − 37)·(0.058/(0.243·(P/100)^3.88 + 1) + 0.013) and Δln P = (pH − 7.40)·((P/26.6)^0.184 − 2.2), both taken at the tension given.
/// </remarks>
public sealed class So2Severinghaus : Definition
{
    private static readonly Slot Misfit = new Slot(Kinds.SeveringhausMisfit, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("so2-severinghaus", "SO2sev", "oxygen saturation by the Severinghaus curve", "%", 0, 100,
        Tolerance.Deviation(1, 0, "typical"), [BloodSlots.Tension, BloodSlots.Ph, BloodSlots.Temperature, Misfit],
        x => Of(x[BloodSlots.Tension], x[BloodSlots.Ph], x[BloodSlots.Temperature]) + x[Misfit]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen saturation calculated from tension, pH and temperature (Severinghaus 1979).";

    /// <inheritdoc/>
    public override string Equation => "SO2sev = 100 / (23400/(P³ + 150·P) + 1), P = PO2·exp(−(T − 37)·(0.058/(0.243·(PO2/100)^3.88 + 1) + 0.013) − (pH − 7.40)·((PO2/26.6)^0.184 − 2.2))";

    /// <inheritdoc/>
    public override string Assumptions => "Adult haemoglobin without carboxy- or methaemoglobin; tension and pH of one sample at the temperature given (an analyser measures at 37 °C). The equation misses its own table 1 by up to 0.55 % saturation, which is in the uncertainty.";

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
        new("Severinghaus JW. Simple, accurate equations for human blood O2 dissociation computations. J Appl Physiol 1979;46:599, equations 1, 3, 4 and table 1"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "table 1 of Severinghaus 1979, 40 mm[Hg]; the paper states a greatest error of 0.55 %", 74.69, 0.55, ("PO2", 40, "mm[Hg]"), ("pH", 7.4, "[pH]"), ("temp", 37, "Cel")),
        new(Evidence.Limit, "exact on paper: 60³ + 150·60 = 225000, and 225000/248400", 90.57971014492754, 1e-9, ("PaO2", 60, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["temp"] = Kinds.GasTemperature };

    /// <summary>Tension in mm[Hg], pH, temperature in °C; result in percent.</summary>
    public static double Of(double tension, double ph, double celsius) =>
        100 * SeveringhausCurve.Saturation(SeveringhausCurve.Standard(tension, ph, celsius));
}
