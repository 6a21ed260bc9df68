using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Base excess of blood by the Van Slyke equation of Siggaard-Andersen.</summary>
/// <remarks>(1 − ctHb/43)·(HCO3 − HCO3 at 7.40 and 5.33 kPa + (2.3·ctHb + 7.7)·(pH − 7.4)), ctHb in mmol/L of monomer.</remarks>
public sealed class BaseExcessBloodSiggaardAndersen : Definition
{
    private const double KiloPascal = 0.133322;
    private static readonly Slot Haemoglobin = new(Kinds.HemoglobinMolar, new Pairing.SameSample());
    private static readonly Slot Solubility = new(Kinds.CO2SolubilitySiggaardAndersen, new Pairing.Site(TimeSpan.Zero));
    private static readonly Slot Pk = new(Kinds.CO2PkSiggaardAndersen, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("base-excess-blood-siggaard-andersen", "BESiggaard", "base excess of blood (Siggaard-Andersen)", "mmol/L", -40, 40,
        Tolerance.Deviation(1, 0, "typical"), [CarbonDioxideSlots.Ph, Slots.PaCO2, Haemoglobin, Solubility, Pk],
        x => Of(x[Solubility], x[Pk], x[CarbonDioxideSlots.Ph], x[Slots.PaCO2] * KiloPascal, x[Haemoglobin]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Base excess of blood from pH, carbon dioxide tension and molar haemoglobin (Siggaard-Andersen).";

    /// <inheritdoc/>
    public override string Equation => "BESiggaard = (1 − ctHb/43)·(alphaS·PCO2·10^(pH − pKS) − alphaS·5.33·10^(7.4 − pKS) + (2.3·ctHb + 7.7)·(pH − 7.4)), PCO2 in kPa";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial blood measured at 37 °C; pH 6.8 to 7.8, PaCO2 10 to 150 mm[Hg]; haemoglobin in mmol/L. Constants: Siggaard-Andersen (0.230 mmol/L/kPa, 6.1, 5.33 kPa).";

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
        CarbonDioxideGates.BaseExcessInRange with { TrippedBy = [("pH", 6.7, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("ctHb", 7.45, "mmol/L")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2"] = Kinds.PaCO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Siggaard-Andersen O. The Van Slyke equation. Scand J Clin Lab Invest Suppl 1977;146:15 (from memory; constants from a public implementation)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "zero point of the equation: 7.40 and 5.33 kPa, whatever the haemoglobin", 0, 0.0001,
            ("pH", 7.4, "[pH]"), ("PaCO2", 5.33, "kPa"), ("ctHb", 9.3, "mmol/L"), ("alphaS", 0.23, "mmol/L/kPa"), ("pKS", 6.1, "[pH]")),
        new(Evidence.Limit, "at pH 7.4 twice the reference tension: one more reference bicarbonate, 0.230·5.33·10^1.3·(1 − 8.6/43)", 19.568, 0.001,
            ("pH", 7.4, "[pH]"), ("PaCO2", 10.66, "kPa"), ("ctHb", 8.6, "mmol/L")),
    ];

    private static Given[] Example => [("pH", 7.2, "[pH]"), ("PaCO2", 60, "mm[Hg]"), ("ctHb", 7.45, "mmol/L")];

    /// <summary>Solubility in mmol/L/kPa, pK', pH, tension in kPa, haemoglobin in mmol/L.</summary>
    public static double Of(double solubility, double pk, double ph, double tension, double haemoglobin) => (1 - (haemoglobin / 43))
        * (Bicarbonate.Of(solubility, tension, ph, pk) - Bicarbonate.Of(solubility, 5.33, 7.4, pk) + (((2.3 * haemoglobin) + 7.7) * (ph - 7.4)));
}
