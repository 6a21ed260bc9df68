using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen that the body takes up in a minute, by the Fick principle.</summary>
/// <remarks>
/// VO2 = 10·CO·(CaO2 − CvO2), CO in L/min, contents in mL/dL. Leaves out what the lung itself consumes.
/// </remarks>
public sealed class OxygenConsumptionFick : Definition
{
    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    private static readonly Slot Output = new(Kinds.CardiacOutput, new Pairing.Nearest(Near, Near));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-consumption-fick", "VO2", "oxygen consumption by the Fick principle", "mL/min", 30, 2000,
        Tolerance.Deviation(0, 0.1, "typical"), [Output, TransportGates.Arterial, TransportGates.Venous],
        x => Of(x[Output], x[OxygenContent.Value], x[OxygenContentVenous.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Cardiac output times the difference of arterial and mixed venous oxygen content.";

    /// <inheritdoc/>
    public override string Equation => "VO2 = 10·CO·(CaO2 − CvO2)";

    /// <inheritdoc/>
    public override string Assumptions => "Cardiac output and mixed venous sample within 5 min of the arterial one; blood of the pulmonary artery. As for the oxygen contents.";

    /// <inheritdoc/>
    public override string Caution => "Shares cardiac output and content with oxygen delivery: never correlate the two. Leaves out the consumption of the lung.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (180, 300);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.CardiacOutput] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        TransportGates.ArterialSample with { TrippedBy = [("CO", 5, "L/min"), ("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("SvO2", 70, "%"), ("PvO2", 38, "mm[Hg]"), ("sample", "venous")] },
        TransportGates.MixedVenous with { TrippedBy = [("CO", 5, "L/min"), ("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("ScvO2", 70, "%"), ("PvO2", 38, "mm[Hg]")] },
        TransportGates.DyshemoglobinKnown with { TrippedBy = [("CO", 5, "L/min"), ("Hb", 12, "g/dL"), ("FO2Hb", 93, "%"), ("PaO2", 80, "mm[Hg]"), ("SvO2", 70, "%"), ("PvO2", 38, "mm[Hg]")] },
        TransportGates.VenousBelowArterial with { TrippedBy = [("CO", 5, "L/min"), ("CaO2", 19, "mL/dL"), ("CvO2", 19.5, "mL/dL")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes => [StandardCode.Loinc("60842-2", "Oxygen consumption (vO2)")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Fick A. Über die Messung des Blutquantums in den Herzventrikeln. Würzburg 1870 (principle; from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "teaching page on oxygen transport: 5 L/min, 20 and 15 mL/dL", 250, 0.05, ("CO", 5, "L/min"), ("CaO2", 20, "mL/dL"), ("CvO2", 15, "mL/dL")),
        new(Evidence.Limit, "the haemoglobin counts once: 10·5·(1.34·10·(1 − 0.75) + 0.003·(140 − 40))", 182.5, 1e-9, ("CO", 5, "L/min"), ("Hb", 10, "g/dL"), ("SaO2", 100, "%"), ("PaO2", 140, "mm[Hg]"), ("SvO2", 75, "%"), ("PvO2", 40, "mm[Hg]")),
    ];

    /// <summary>Cardiac output in L/min, contents in mL/dL; result in mL/min.</summary>
    public static double Of(double output, double arterial, double venous) => 10 * output * (arterial - venous);
}
