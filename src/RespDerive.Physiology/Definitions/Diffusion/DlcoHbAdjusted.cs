using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Diffusing capacity for carbon monoxide, adjusted to a standard haemoglobin.</summary>
/// <remarks>
/// Cotes: DLCO·(10.22 + Hb)/(1.7·Hb) for men of 15 years and more, DLCO·(9.38 + Hb)/(1.7·Hb) for women and for those under 15.
/// The factor is 1 at 14.6 and 13.4 g/dL.
/// </remarks>
public sealed class DlcoHbAdjusted : Definition
{
    private static readonly Slot Anchor = new(Kinds.Dlco, new Pairing.AnchorItself());
    private static readonly Slot Haemoglobin = new(Kinds.Hemoglobin, new Pairing.Nearest(TimeSpan.FromHours(24), TimeSpan.FromHours(24)));
    private static readonly Slot Group = new("sex",
        [new Option(Kinds.DlcoGroup, new Pairing.ByHand()), new Option(Kinds.Sex, new Pairing.Standing())], Withheld.SexUnknown);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dlco-hb-adjusted", "DLCOadj", "diffusing capacity for carbon monoxide adjusted for haemoglobin", "mL/min/mm[Hg]", 1, 80,
        Tolerance.Deviation(0, 0.06, "typical"), [Anchor, Haemoglobin, Group], x => Of(x[Anchor], x[Haemoglobin], IsMan(x)));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "Single-breath diffusing capacity adjusted to a haemoglobin of 14.6 (men) or 13.4 g/dL (women, under 15 years).";

    /// <inheritdoc/>
    public override string Equation => "DLCOadj = DLCO·(k + Hb)/(1.7·Hb), k = 10.22 (men of 15 a and more) or 9.38 (women, under 15 a)";

    /// <inheritdoc/>
    public override string Assumptions => "Hb 5 to 22 g/dL, at most 24 h from the manoeuvre, without bleeding or transfusion between. Constants: Cotes 1972 (10.22, 9.38, 1.7).";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. Adjust the measured or the predicted value, never both. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (15, 40);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Dlco]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.SexUnknown, "the sex is unknown", [], x => x.Code(Kinds.Sex) == "unknown" && !x.Has(Kinds.DlcoGroup),
            ("DLCO", 20, "mL/min/mm[Hg]"), ("Hb", 13, "g/dL"), ("sex", "unknown")),
        new Gate(Withheld.InputInvalid, "haemoglobin is below 5 or above 22 g/dL", [], x => x.Has(Kinds.Hemoglobin) && x[Kinds.Hemoglobin] is < 5 or > 22,
            ("DLCO", 20, "mL/min/mm[Hg]"), ("Hb", 4, "g/dL"), ("group", "male >= 15 y")),
        new Gate(Withheld.InputInvalid, "the manoeuvre was graded unacceptable", [Kinds.DlcoGrade], x => x.Code(Kinds.DlcoGrade) == "unacceptable",
            ("DLCO", 20, "mL/min/mm[Hg]"), ("Hb", 13, "g/dL"), ("group", "male >= 15 y"), ("grade", "unacceptable")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [new FlagRule(Flags.AgeUnconfirmed, [Kinds.Age], x => !x.Has(Kinds.DlcoGroup) && x.Code(Kinds.Sex) == "male" && !x.Has(Kinds.Age))];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("19913-3", "Diffusion capacity.carbon monoxide adjusted for hemoglobin"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Cotes JE et al. Iron-deficiency anaemia: its effect on transfer factor for the lung. Clin Sci 1972;42:325 (from memory)"),
        new("Graham BL et al. 2017 ERS/ATS standards for single-breath carbon monoxide uptake in the lung. Eur Respir J 2017;49:1600016 (form)", "10.1183/13993003.00016-2016"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "ERS/ATS 2017: no adjustment at 14.6 g/dL in men", 25, 1e-9,
            ("DLCO", 25, "mL/min/mm[Hg]"), ("Hb", 14.6, "g/dL"), ("group", "male >= 15 y")),
        new(Evidence.Published, "ERS/ATS 2017: no adjustment at 13.4 g/dL in women", 20, 1e-9,
            ("DLCO", 20, "mL/min/mm[Hg]"), ("Hb", 134, "g/L"), ("sex", "female")),
    ];

    /// <summary>Diffusing capacity in any unit, haemoglobin in g/dL.</summary>
    public static double Of(double dlco, double haemoglobin, bool man) => dlco * ((man ? 10.22 : 9.38) + haemoglobin) / (1.7 * haemoglobin);

    private static bool IsMan(Roots x) => x.Has(Kinds.DlcoGroup)
        ? x.Code(Kinds.DlcoGroup) == "male >= 15 y"
        : x.Code(Kinds.Sex) == "male" && !(x.Has(Kinds.Age) && x[Kinds.Age] < 15);
}
