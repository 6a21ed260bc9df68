using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Base excess of the extracellular fluid (standard base excess).</summary>
/// <remarks>SBE = HCO3 − 24.8 + 16.2·(pH − 7.4), the CLSI C46 form on the CLSI bicarbonate.</remarks>
public sealed class BaseExcessEcf : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("base-excess-ecf", "SBE", "base excess of the extracellular fluid", "mmol/L", -40, 40,
        Tolerance.Deviation(1, 0, "typical"), [CarbonDioxideSlots.Ph, new Slot(Bicarbonate.Value, new Pairing.SameSample())],
        x => Of(x[Bicarbonate.Value], x[CarbonDioxideSlots.Ph]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Base excess of the extracellular fluid from pH and bicarbonate (CLSI).";

    /// <inheritdoc/>
    public override string Equation => "SBE = HCO3 − 24.8 + 16.2·(pH − 7.4)";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial blood measured at 37 °C; pH 6.8 to 7.8, PaCO2 10 to 150 mm[Hg]. Constants: CLSI C46 (24.8, 16.2; bicarbonate with 0.0307 and 6.105).";

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
        CarbonDioxideGates.BaseExcessInRange with { TrippedBy = [("pH", 6.7, "[pH]"), ("PaCO2", 60, "mm[Hg]")] },
        CarbonDioxideGates.ClsiBicarbonate with { TrippedBy = [.. Example, ("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.1, "[pH]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2"] = Kinds.PaCO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("CLSI C46. Blood gas and pH analysis and related measurements (constants seen in a secondary note)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "zero at the reference point", 0, 1e-9,
            ("HCO3", 24.8, "mmol/L"), ("pH", 7.4, "[pH]")),
        new(Evidence.Limit, "buffering of 16.2 mmol/L per pH unit: a tenth of a unit above the reference point", 1.62, 1e-9,
            ("HCO3", 24.8, "mmol/L"), ("pH", 7.5, "[pH]")),
        new(Evidence.Limit, "CLSI bicarbonate 10·0.0307·50 at pH 7.105: 15.35 − 24.8 − 16.2·0.295", -14.229, 1e-9,
            ("pH", 7.105, "[pH]"), ("PaCO2", 50, "mm[Hg]"), ("alphaCO2", 0.0307, "mmol/L/mm[Hg]"), ("pK", 6.105, "[pH]")),
    ];

    private static Given[] Example => [("pH", 7.2, "[pH]"), ("PaCO2", 60, "mm[Hg]")];

    /// <summary>Bicarbonate in mmol/L and pH.</summary>
    public static double Of(double bicarbonate, double ph) => bicarbonate - 24.8 + (16.2 * (ph - 7.4));
}
