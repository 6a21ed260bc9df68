using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Body weight predicted from height and sex, to which tidal volumes are scaled.</summary>
/// <remarks>
/// PBW = 50 (male) or 45.5 (female) + 0.91·(height in cm − 152.4): the centimetre form printed by the ARDS Network.
/// The inch form (2.3 kg per inch over 60) differs by up to 0.2 kg. Adults of 140 to 210 cm; never the actual weight.
/// </remarks>
public sealed class PredictedBodyWeight : Definition
{
    private static readonly Slot Anchor = new(Kinds.Height, new Pairing.AnchorItself());

    private static readonly Slot Sex = new(Kinds.Sex, new Pairing.Standing(), Withheld.SexUnknown);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("predicted-body-weight", "PBW", "predicted body weight", "kg", 25, 110,
        Tolerance.Deviation(0.5, 0, "height ±1 cm"), [Anchor, Sex], x => Of(x.Code(Kinds.Sex), x[Anchor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Body size";

    /// <inheritdoc/>
    public override string Summary => "Body weight predicted from height and sex by the ARDS Network formula.";

    /// <inheritdoc/>
    public override string Equation => "PBW = 50 (male) or 45.5 (female) + 0.91·(height − 152.4)";

    /// <inheritdoc/>
    public override string EquationInLatex => @"\mathrm{PBW} = \begin{cases} 50 & \text{male} \\ 45.5 & \text{female} \end{cases} + 0.91\cdot(\mathrm{height} - 152.4)";

    /// <inheritdoc/>
    public override string Assumptions => "Adults of 140 to 210 cm. The sex is the one the formula was made for, sex at birth. Not valid in children.";

    /// <inheritdoc/>
    public override string Caution => "Adults only. Check the source of height and sex: an estimated height moves the weight by several kilograms. Never the actual weight.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (40, 90);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Height]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.SexKnown,
        CommonGates.Adult,
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.AgeUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Loinc("50064-5", "Ideal body weight")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Acute Respiratory Distress Syndrome Network. Ventilation with lower tidal volumes. N Engl J Med 2000;342:1301, methods (predicted body weight)", "10.1056/NEJM200005043421801"),
        new("Devine BJ. Gentamicin therapy. Drug Intell Clin Pharm 1974;8:650 (from memory)"),
        new("Martin DC, Richards GN. Predicted body weight relationships for protective ventilation: unisex proposals from pre-term through to adult. BMC Pulm Med 2017;17:85 (range)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "ARDS Network table of predicted body weight: male, 60 inches, 50.0 kg", 50, 1e-9, ("sex", "male"), ("height", 152.4, "cm")),
        new(Evidence.Published, "ARDS Network table of predicted body weight: female, 60 inches, 45.5 kg", 45.5, 1e-9, ("sex", "female"), ("height", 60, "[in_i]")),
        new(Evidence.Published, "ARDS Network table of predicted body weight: male, 70 inches, 73.0 kg (inch form, up to 0.2 kg apart)", 73, 0.2, ("sex", "male"), ("height", 70, "[in_i]")),
    ];

    /// <summary>Height in cm; NaN when the sex is neither male nor female.</summary>
    public static double Of(string? sex, double height) => (sex switch { "male" => 50, "female" => 45.5, _ => double.NaN }) + (0.91 * (height - 152.4));
}
