using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>pH that the blood has at the temperature of the patient.</summary>
/// <remarks>pH + (−0.0147 + 0.0065·(7.4 − pH))·(t − 37): colder blood is more alkaline.</remarks>
public sealed class PhTemperatureCorrected : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("ph-temperature-corrected", "pHT", "pH at the temperature of the patient", "[pH]", 6.6, 8.0,
        Tolerance.Deviation(0.01, 0, "typical"), [CarbonDioxideSlots.Ph, CarbonDioxideSlots.Temperature],
        x => Of(x[CarbonDioxideSlots.Ph], x[CarbonDioxideSlots.Temperature]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "pH of arterial blood, from 37 °C to the temperature of the patient.";

    /// <inheritdoc/>
    public override string Equation => "pHT = pH37 + (−0.0147 + 0.0065·(7.4 − pH37))·(temp − 37)";

    /// <inheritdoc/>
    public override string Assumptions => "25 to 42 °C; the gas as measured at 37 °C; core temperature of the hour before the draw.";

    /// <inheritdoc/>
    public override string Caution => "For display beside the value at 37 °C, never in its place: ratios and gradients use the values at 37 °C. Check that the analyser did not correct already. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (7.2, 7.6);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PhArterial]) { OnlyWith = [Kinds.BodyTemperature] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CarbonDioxideGates.NotYetCorrected with { TrippedBy = [.. Example, ("corrected", "true")] },
        CarbonDioxideGates.TemperatureInRange with { TrippedBy = [("pH37", 7.3, "[pH]"), ("temp", 24, "Cel")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CarbonDioxideGates.CorrectionUnstated];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["pH37"] = Kinds.PhArterial };

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("33254-4", "pH of Arterial blood adjusted to patient's actual temperature"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("CLSI C46. Blood gas and pH analysis and related measurements (form from memory)"),
        new("Rosenthal TB. The effect of temperature on the pH of blood and plasma in vitro. J Biol Chem 1948;173:25 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Rosenthal 1948: −0.0147 per °C at pH 7.40 (from memory)", 7.4588, 1e-9,
            ("pH", 7.4, "[pH]"), ("temp", 33, "Cel")),
        new(Evidence.Limit, "at 37 °C nothing changes", 7.3, 1e-9,
            ("pH", 7.3, "[pH]"), ("temp", 37, "Cel")),
    ];

    private static Given[] Example => [("pH37", 7.3, "[pH]"), ("temp", 33, "Cel")];

    /// <summary>pH at 37 °C and a temperature in °C.</summary>
    public static double Of(double ph, double celsius) => ph + ((-0.0147 + (0.0065 * (7.4 - ph))) * (celsius - 37));
}
