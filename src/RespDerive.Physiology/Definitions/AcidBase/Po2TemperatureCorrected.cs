using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen tension that the blood has at the temperature of the patient.</summary>
/// <remarks>Severinghaus 1979, equation 3. About 7 % per °C while haemoglobin takes up or gives off oxygen, 1.3 % where it is full.</remarks>
public sealed class Po2TemperatureCorrected : Definition
{
    private static readonly Slot Anchor = new(Kinds.PaO2, new Pairing.AnchorItself());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("po2-temperature-corrected", "PaO2T", "arterial oxygen partial pressure at the temperature of the patient", "mm[Hg]", 5, 750,
        Tolerance.Deviation(0, 0.06, "typical"), [Anchor, CarbonDioxideSlots.Temperature],
        x => Of(x[Anchor], x[CarbonDioxideSlots.Temperature]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Arterial oxygen tension, from 37 °C to the temperature of the patient.";

    /// <inheritdoc/>
    public override string Equation => "PaO2T = PO2_37·exp((temp − 37)·(0.058/(0.243·(PO2_37/100)^3.88 + 1) + 0.013))";

    /// <inheritdoc/>
    public override string Assumptions => "25 to 42 °C; the gas as measured at 37 °C; core temperature of the hour before the draw.";

    /// <inheritdoc/>
    public override string Caution => "For display beside the value at 37 °C, never in its place: ratios and gradients use the values at 37 °C. Check that the analyser did not correct already. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (30, 500);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.BodyTemperature] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CarbonDioxideGates.NotYetCorrected with { TrippedBy = [.. Example, ("corrected", "true")] },
        CarbonDioxideGates.TemperatureInRange with { TrippedBy = [("PO2_37", 80, "mm[Hg]"), ("temp", 24, "Cel")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CarbonDioxideGates.CorrectionUnstated];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PO2_37"] = Kinds.PaO2 };

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("19255-9", "Oxygen [Partial pressure] adjusted to patient's actual temperature in Arterial blood"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Severinghaus JW. Simple, accurate equations for human blood O2 dissociation computations. J Appl Physiol 1979;46:599, equation 3"),
        new("Bradley AF, Stupfel M, Severinghaus JW. Effect of temperature on PCO2 and PO2 of blood in vitro. J Appl Physiol 1956;9:201 (about 6 % per °C)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Bradley 1956: about 6 % per °C, from 80 mm[Hg] down one degree", 75.5, 0.8,
            ("PaO2", 80, "mm[Hg]"), ("temp", 36, "Cel")),
        new(Evidence.Limit, "at 37 °C nothing changes", 80, 1e-9,
            ("PaO2", 80, "mm[Hg]"), ("temp", 37, "Cel")),
        new(Evidence.Limit, "full haemoglobin: only the solubility changes, 700·e^0.013", 709.16, 0.15,
            ("PaO2", 700, "mm[Hg]"), ("temp", 38, "Cel")),
    ];

    private static Given[] Example => [("PO2_37", 80, "mm[Hg]"), ("temp", 33, "Cel")];

    /// <summary>Tension at 37 °C in mm[Hg], temperature in °C.</summary>
    public static double Of(double pao2, double celsius) =>
        pao2 * Math.Exp((celsius - 37) * ((0.058 / ((0.243 * Math.Pow(pao2 / 100, 3.88)) + 1)) + 0.013));
}
