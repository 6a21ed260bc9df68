using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tension that gives on the standard Kelman curve the saturation of the blood as it is.</summary>
/// <remarks>
/// x = PO2·10^(0.024·(37 − T) + 0.40·(pH − 7.40) + 0.06·log10(40/PCO2)), tensions in mm[Hg], T in °C.
/// </remarks>
public sealed class KelmanVirtualPo2 : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("kelman-virtual-po2", "xKelman", "virtual oxygen tension of the Kelman curve", "mm[Hg]", 0.1, 3000,
        Tolerance.Deviation(0, 0.06, "typical"), [BloodSlots.Tension, BloodSlots.Ph, BloodSlots.CarbonDioxide, BloodSlots.Temperature],
        x => Of(x[BloodSlots.Tension], x[BloodSlots.Ph], x[BloodSlots.CarbonDioxide], x[BloodSlots.Temperature]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Oxygen tension brought to standard temperature, pH and carbon dioxide tension (Kelman 1966).";

    /// <inheritdoc/>
    public override string Equation => "xKelman = PO2·10^(0.024·(37 − T) + 0.40·(pH − 7.40) + 0.06·log10(40/PCO2))";

    /// <inheritdoc/>
    public override string Assumptions => "Tensions and pH of one sample at the temperature given (an analyser measures at 37 °C). No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A step of a calculation, not a tension of the patient.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (1, 1500);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Kelman GR. Digital computer subroutine for the conversion of oxygen tension into saturation. J Appl Physiol 1966;21:1375"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "printed output of a university P50 program (Kelman routine), sample 46 / 30.7 / 7.38", 45.88, 0.006, ("PO2", 46, "mm[Hg]"), ("PCO2", 30.7, "mm[Hg]"), ("pH", 7.38, "[pH]"), ("temp", 37, "Cel")),
        new(Evidence.Limit, "nothing to bring to standard conditions", 60, 1e-9, ("PO2", 60, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["temp"] = Kinds.GasTemperature };

    /// <summary>Tensions in mm[Hg], temperature in °C.</summary>
    public static double Of(double tension, double ph, double pco2, double celsius) =>
        tension * Math.Pow(10, (0.024 * (37 - celsius)) + (0.40 * (ph - 7.4)) + (0.06 * Math.Log10(40 / pco2)));
}
