using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Carbon dioxide tension that the blood has at the temperature of the patient.</summary>
/// <remarks>PaCO2·10^(0.019·(t − 37)): about 4.4 % per °C. Other forms use 0.021.</remarks>
public sealed class Pco2TemperatureCorrected : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("pco2-temperature-corrected", "PaCO2T", "arterial carbon dioxide partial pressure at the temperature of the patient", "mm[Hg]", 3, 250,
        Tolerance.Deviation(0, 0.03, "typical"), [CarbonDioxideSlots.PaCO2, CarbonDioxideSlots.Temperature],
        x => Of(x[CarbonDioxideSlots.PaCO2], x[CarbonDioxideSlots.Temperature]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Arterial carbon dioxide tension, from 37 °C to the temperature of the patient.";

    /// <inheritdoc/>
    public override string Equation => "PaCO2T = PCO2_37·10^(0.019·(temp − 37))";

    /// <inheritdoc/>
    public override string Assumptions => "25 to 42 °C; the gas as measured at 37 °C; core temperature of the hour before the draw. Constant: 0.019 per °C (CLSI C46).";

    /// <inheritdoc/>
    public override string Caution => "For display beside the value at 37 °C, never in its place: ratios and gradients use the values at 37 °C. Check that the analyser did not correct already. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (20, 80);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = [Kinds.BodyTemperature] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CarbonDioxideGates.NotYetCorrected with { TrippedBy = [.. Example, ("corrected", "true")] },
        CarbonDioxideGates.TemperatureInRange with { TrippedBy = [("PCO2_37", 40, "mm[Hg]"), ("temp", 24, "Cel")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CarbonDioxideGates.CorrectionUnstated];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2_37"] = Kinds.PaCO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("32771-8", "Carbon dioxide [Partial pressure] adjusted to patient's actual temperature in Arterial blood"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("CLSI C46. Blood gas and pH analysis and related measurements (form from memory)"),
        new("Bradley AF, Stupfel M, Severinghaus JW. Effect of temperature on PCO2 and PO2 of blood in vitro. J Appl Physiol 1956;9:201 (4.4 % per °C)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Bradley 1956: 4.4 % per °C, from 40 mm[Hg] down one degree", 38.3, 0.05,
            ("PaCO2", 40, "mm[Hg]"), ("temp", 36, "Cel")),
        new(Evidence.Limit, "at 37 °C nothing changes", 40, 1e-9,
            ("PaCO2", 40, "mm[Hg]"), ("temp", 37, "Cel")),
    ];

    private static Given[] Example => [("PCO2_37", 40, "mm[Hg]"), ("temp", 33, "Cel")];

    /// <summary>Tension at 37 °C, temperature in °C.</summary>
    public static double Of(double paco2, double celsius) => paco2 * Math.Pow(10, 0.019 * (celsius - 37));
}
