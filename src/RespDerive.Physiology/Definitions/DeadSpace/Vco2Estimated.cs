using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Carbon dioxide production estimated from body size, age and sex.</summary>
/// <remarks>
/// Resting energy expenditure by Harris and Benedict (kcal/d), turned into carbon dioxide by Weir at an assumed exchange ratio.
/// The equation errs by about 20 % in intensive care; that error is the root kREE, assumed 1 ± 0.2.
/// </remarks>
public sealed class Vco2Estimated : Definition
{
    private static readonly Slot Anchor = new(Kinds.Weight, new Pairing.AnchorItself());
    private static readonly Slot Height = new(Kinds.Height, new Pairing.Standing());
    private static readonly Slot Age = new(Kinds.Age, new Pairing.Standing());
    private static readonly Slot Sex = new(Kinds.Sex, new Pairing.Standing(), Withheld.SexUnknown);
    private static readonly Slot Factor = new(Kinds.EnergyFactor, new Pairing.Site(TimeSpan.Zero));
    private static readonly Gate SexKnown = new(Withheld.SexUnknown, "the sex is unknown", [], x => x.Code(Kinds.Sex) == "unknown",
        ("weight", 70, "kg"), ("height", 175, "cm"), ("age", 60, "a"), ("sex", "unknown"));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("vco2-estimated", "VCO2est", "estimated carbon dioxide production (STPD)", "mL/min", 50, 600,
        Tolerance.Deviation(0, 0.2, "predictive equations in intensive care"), [Anchor, Height, Age, Sex, Slots.RespiratoryQuotient, Factor],
        x => x[Factor] * Of(Expenditure(x.Code(Kinds.Sex), x[Anchor], x[Height], x[Age]), x[Slots.RespiratoryQuotient]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Carbon dioxide production predicted from weight, height, age and sex (Harris-Benedict and Weir).";

    /// <inheritdoc/>
    public override string Equation => "VCO2est = kREE·REE/(1.44·(3.941/R + 1.106)); REE = 66.473 + 13.7516·weight + 5.0033·height − 6.755·age (male) or 655.0955 + 9.5634·weight + 1.8496·height − 4.6756·age (female)";

    /// <inheritdoc/>
    public override string Assumptions => "Resting adults; actual weight; R assumed 0.8 unless given. Some secondary sources print 6.775 for 6.755. Made on healthy people of 15 to 74 years (from memory); predicts within 10 % in under half of patients in intensive care.";

    /// <inheritdoc/>
    public override string Caution => "An estimate from body size, blind to fever, feeding and sedation: about ±20 %. Adults only.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (120, 350);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Weight]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        SexKnown,
        CommonGates.Adult with { TrippedBy = [("weight", 40, "kg"), ("height", 150, "cm"), ("age", 12, "a"), ("sex", "male")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Harris JA, Benedict FG. A biometric study of human basal metabolism. Proc Natl Acad Sci 1918;4:370 (coefficients as printed in Ann Intensive Care 2016)"),
        new("Weir JB. New methods for calculating metabolic rate with special reference to protein metabolism. J Physiol 1949;109:1 (from memory)"),
        new("Comparison of equations that predict energy expenditure in intensive care. Ann Intensive Care 2016, equations and accuracy tables", "10.1186/s13613-016-0118-8"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Siddiki 2010: VCO2 = 0.8·REE/6.8644 (constants from memory, 1.2 % apart): REE 1499.4 kcal/d gives 174.7", 174.7, 2.7,
            ("weight", 70, "kg"), ("height", 175, "cm"), ("age", 60, "a"), ("sex", "male"), ("R", 0.8, "1"), ("kREE", 1, "1")),
        new(Evidence.Limit, "Weir at R = 1, where both gases count 5.047 kcal/L: 1499.36/(1.44·5.047)", 206.3, 0.05,
            ("weight", 70, "kg"), ("height", 175, "cm"), ("age", 60, "a"), ("sex", "male"), ("R", 1, "1")),
        new(Evidence.Limit, "women, 60 kg, 160 cm, 50 a: REE 1291.1 kcal/d summed on paper, over 1.44·5.047", 177.65, 0.05,
            ("weight", 60, "kg"), ("height", 160, "cm"), ("age", 50, "a"), ("sex", "female"), ("R", 1, "1")),
    ];

    /// <summary>Resting energy expenditure in kcal/d from kg, cm and years; NaN when the sex is neither male nor female.</summary>
    public static double Expenditure(string? sex, double weight, double height, double age) => sex switch
    {
        "male" => 66.473 + (13.7516 * weight) + (5.0033 * height) - (6.755 * age),
        "female" => 655.0955 + (9.5634 * weight) + (1.8496 * height) - (4.6756 * age),
        _ => double.NaN,
    };

    /// <summary>Carbon dioxide production in mL/min from kcal/d, by Weir.</summary>
    public static double Of(double expenditure, double r) => expenditure / (1.44 * ((3.941 / r) + 1.106));
}
