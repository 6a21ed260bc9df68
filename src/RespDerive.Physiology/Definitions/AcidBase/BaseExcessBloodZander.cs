using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Base excess of blood by the Van Slyke form that Lang and Zander recommend.</summary>
/// <remarks>Takes the saturation into account: the same at any saturation, since unloading oxygen is not a metabolic change.</remarks>
public sealed class BaseExcessBloodZander : Definition
{
    private static readonly Slot Haemoglobin = new(Kinds.Hemoglobin, new Pairing.SameSample());
    private static readonly Slot Saturation = new(Kinds.SaO2, new Pairing.SameSample());
    private static readonly Slot Solubility = new(Kinds.CO2SolubilityZander, new Pairing.Site(TimeSpan.Zero));
    private static readonly Slot Pk = new(Kinds.CO2PkZander, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("base-excess-blood-zander", "BEZander", "base excess of blood (Lang and Zander)", "mmol/L", -40, 40,
        Tolerance.Deviation(1, 0, "typical"), [CarbonDioxideSlots.Ph, Slots.PaCO2, Haemoglobin, Saturation, Solubility, Pk],
        x => Of(Bicarbonate.Of(x[Solubility], x[Slots.PaCO2], x[CarbonDioxideSlots.Ph], x[Pk]), x[CarbonDioxideSlots.Ph], x[Haemoglobin], x[Saturation] / 100));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Base excess of blood from pH, carbon dioxide tension, haemoglobin and saturation (Lang and Zander 2002).";

    /// <inheritdoc/>
    public override string Equation => "BEZander = (1 − 0.0143·Hb)·((alphaZ·PCO2·10^(pH − pKZ) − 24.26) + (9.5 + 1.63·Hb)·(pH − 7.4)) − 0.2·Hb·(1 − SO2/100)";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial blood measured at 37 °C; pH 6.8 to 7.8, PaCO2 10 to 150 mm[Hg]; within 1 mmol/L of reference data for ±30 mmol/L (abstract). Constants: Zander (0.0304 mmol/L/mm[Hg], 6.1, 24.26).";

    /// <inheritdoc/>
    public override string Caution => "Names its method: variants differ by 0.5 to 1 mmol/L. The value the analyser reports goes before this one. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (-3, 3);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PhArterial]) { NotWith = [Kinds.BaseExcessReported] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CarbonDioxideGates.NotYetCorrected with { TrippedBy = [.. Example, ("corrected", "true")] },
        CarbonDioxideGates.BaseExcessInRange with { TrippedBy = [("pH", 6.7, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("Hb", 12, "g/dL"), ("SO2", 0.95, "1")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2"] = Kinds.PaCO2, ["SO2"] = Kinds.SaO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Lang W, Zander R. The accuracy of calculated base excess in blood. Clin Chem Lab Med 2002;40:404, abstract"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Lang and Zander 2002: zero at 7.40, 40 mm[Hg], full saturation", 0, 0.01,
            ("pH", 7.4, "[pH]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 15, "g/dL"), ("SaO2", 100, "%"), ("alphaZ", 0.0304, "mmol/L/mm[Hg]"), ("pKZ", 6.1, "[pH]")),
        new(Evidence.Limit, "unloading half of the oxygen at the zero point: −0.2·10·0.5", -1, 0.01,
            ("pH", 7.4, "[pH]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 50, "%")),
    ];

    private static Given[] Example => [("pH", 7.2, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("Hb", 12, "g/dL"), ("SO2", 0.95, "1")];

    /// <summary>Bicarbonate (Zander's set) in mmol/L, pH, haemoglobin in g/dL, saturation as a fraction.</summary>
    public static double Of(double bicarbonate, double ph, double haemoglobin, double saturation) =>
        ((1 - (0.0143 * haemoglobin)) * (bicarbonate - 24.26 + ((9.5 + (1.63 * haemoglobin)) * (ph - 7.4)))) - (0.2 * haemoglobin * (1 - saturation));
}
