using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Base excess of blood by the form of CLSI C46.</summary>
/// <remarks>(1 − 0.014·Hb)·((HCO3 − 24.8) + (1.43·Hb + 7.7)·(pH − 7.4)) on the CLSI bicarbonate.</remarks>
public sealed class BaseExcessBloodClsi : Definition
{
    private static readonly Slot Haemoglobin = new(Kinds.Hemoglobin.Name,
        [new Option(Kinds.Hemoglobin, new Pairing.SameSample()), new Option(Kinds.Hemoglobin, new Pairing.Nearest(TimeSpan.FromHours(6), TimeSpan.Zero))]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("base-excess-blood-clsi", "BEClsi", "base excess of blood (CLSI)", "mmol/L", -40, 40,
        Tolerance.Deviation(1, 0, "typical"), [CarbonDioxideSlots.Ph, new Slot(Bicarbonate.Value, new Pairing.SameSample()), Haemoglobin],
        x => Of(x[Bicarbonate.Value], x[CarbonDioxideSlots.Ph], x[Kinds.Hemoglobin]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Base excess of blood from pH, carbon dioxide tension and haemoglobin (CLSI C46).";

    /// <inheritdoc/>
    public override string Equation => "BEClsi = (1 − 0.014·Hb)·((HCO3 − 24.8) + (1.43·Hb + 7.7)·(pH − 7.4))";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial blood measured at 37 °C; pH 6.8 to 7.8, PaCO2 10 to 150 mm[Hg]; Hb in g/dL of the same sample, else of the 6 h before. Constants: CLSI C46 (24.8, 1.43, 7.7; bicarbonate with 0.0307 and 6.105).";

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
        CarbonDioxideGates.BaseExcessInRange with { TrippedBy = [("pH", 6.7, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("Hb", 12, "g/dL")] },
        CarbonDioxideGates.ClsiBicarbonate with { TrippedBy = [.. Example, ("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.1, "[pH]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2"] = Kinds.PaCO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("CLSI C46. Blood gas and pH analysis and related measurements (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "zero at the reference point, whatever the haemoglobin", 0, 1e-9,
            ("HCO3", 24.8, "mmol/L"), ("pH", 7.4, "[pH]"), ("Hb", 15, "g/dL")),
        new(Evidence.Limit, "at pH 7.4 the bicarbonate deficit less the share of the cells: −10·(1 − 0.014·10)", -8.6, 1e-9,
            ("HCO3", 14.8, "mmol/L"), ("pH", 7.4, "[pH]"), ("Hb", 10, "g/dL")),
        new(Evidence.Limit, "CLSI bicarbonate 10·0.0307·50 at pH 7.105, Hb 10: 0.86·(−9.45 − 22·0.295)", -13.7084, 1e-6,
            ("pH", 7.105, "[pH]"), ("PaCO2", 50, "mm[Hg]"), ("Hb", 10, "g/dL"), ("alphaCO2", 0.0307, "mmol/L/mm[Hg]"), ("pK", 6.105, "[pH]")),
    ];

    private static Given[] Example => [("pH", 7.2, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("Hb", 12, "g/dL")];

    /// <summary>Bicarbonate in mmol/L, pH, haemoglobin in g/dL.</summary>
    public static double Of(double bicarbonate, double ph, double haemoglobin) =>
        (1 - (0.014 * haemoglobin)) * (bicarbonate - 24.8 + (((1.43 * haemoglobin) + 7.7) * (ph - 7.4)));
}
