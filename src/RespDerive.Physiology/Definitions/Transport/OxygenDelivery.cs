using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen that the heart sends to the body in a minute.</summary>
/// <remarks>
/// DO2 = 10·CO·CaO2, CO in L/min, CaO2 in mL/dL. Not indexed to body surface.
/// </remarks>
public sealed class OxygenDelivery : Definition
{
    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    private static readonly Slot Output = new(Kinds.CardiacOutput, new Pairing.Nearest(Near, Near));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-delivery", "DO2", "oxygen delivery", "mL/min", 50, 4000,
        Tolerance.Deviation(0, 0.075, "typical"), [Output, TransportGates.Arterial], x => Of(x[Output], x[OxygenContent.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Cardiac output times arterial oxygen content.";

    /// <inheritdoc/>
    public override string Equation => "DO2 = 10·CO·CaO2";

    /// <inheritdoc/>
    public override string Assumptions => "Cardiac output within 5 min of the sample, not cardiac index. As for the oxygen content.";

    /// <inheritdoc/>
    public override string Caution => "Shares cardiac output and content with oxygen consumption: never correlate the two. Rests on the haemoglobin and on the constants shown.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (700, 1300);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.CardiacOutput] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        TransportGates.ArterialSample with { TrippedBy = [("CO", 5, "L/min"), ("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("sample", "venous")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Calculation of oxygen delivery: table in a postgraduate medical journal (4.9 L/min and 194 mL/L give 950.6 mL/min); common practice, no single source"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "calculation of oxygen delivery, 70 kg man, table in a postgraduate medical journal", 950.6, 0.05, ("CO", 4.9, "L/min"), ("CaO2", 194, "mL/L")),
        new(Evidence.Limit, "exact on paper: 10·5·(1.34·10·1 + 0.003·200)", 700, 1e-9, ("CO", 5, "L/min"), ("Hb", 10, "g/dL"), ("SaO2", 100, "%"), ("PaO2", 200, "mm[Hg]")),
    ];

    /// <summary>Cardiac output in L/min, content in mL/dL; result in mL/min.</summary>
    public static double Of(double output, double content) => 10 * output * content;
}
