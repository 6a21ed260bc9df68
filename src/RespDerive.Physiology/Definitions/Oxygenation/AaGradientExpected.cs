using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Alveolar-arterial oxygen difference expected of a healthy person of an age.</summary>
/// <remarks>
/// By the rule that is named in the inputs: age/4 + 4, (age + 10)/4, or 2.5 + 0.21·age; age in years, result in mm[Hg].
/// On room air, seated, near sea level. The spread of healthy people is a root of value zero.
/// </remarks>
public sealed class AaGradientExpected : Definition
{
    private static readonly Slot Years = new(Kinds.Age, new Pairing.ByHand());

    private static readonly Slot Rule = new(Kinds.ExpectedGradientRule, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("aa-gradient-expected", "AaDO2exp", "alveolar-arterial oxygen difference expected for age", "mm[Hg]", 2, 40,
        Tolerance.Deviation(7, 0, "spread of the reference population (from memory)"),
        [Years, Rule, new Slot(Kinds.PopulationSpread, new Pairing.ByHand())],
        x => Of(x[Years], Kinds.ExpectedGradientRule.Codes[(int)x[Kinds.ExpectedGradientRule]]) + x[Kinds.PopulationSpread]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "What the A-a gradient of a healthy adult of this age would be on room air, by a named rule.";

    /// <inheritdoc/>
    public override string Equation => "AaDO2exp = age/4 + 4, or (age + 10)/4, or 2.5 + 0.21·age";

    /// <inheritdoc/>
    public override string Assumptions => "Adults breathing room air, seated, near sea level.";

    /// <inheritdoc/>
    public override string Caution => "A prediction for healthy people with a wide spread; never on supplemental oxygen. Not a limit of normal for one patient.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (7, 30);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.AgeOutOfRange, "the person is under 18", [], x => x.Has(Kinds.Age) && x[Kinds.Age] < 18, ("age", 12, "a"), ("rule", "age/4+4")),
        new Gate(Withheld.NotOnRoomAir, "FiO2 is above 0.22", [], x => x.Has(Kinds.FiO2) && x[Kinds.FiO2] > 0.22,
            ("age", 40, "a"), ("rule", "age/4+4"), ("FiO2", 0.4, "1")) { ReadsByHand = [Kinds.FiO2] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Teaching rules age/4 + 4 and (age + 10)/4, as printed on teaching pages; common practice, no single source"),
        new("Mellemgaard K. The alveolar-arterial oxygen difference: its size and components in normal man. Acta Physiol Scand 1966;67:10 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "teaching page on the rule age/4 + 4: 9 at 20 years", 9, 1e-9, ("age", 20, "a"), ("rule", "age/4+4")),
        new(Evidence.Published, "teaching page on the rule age/4 + 4: 24 at 80 years", 24, 1e-9, ("age", 80, "a"), ("rule", "age/4+4")),
        new(Evidence.Published, "teaching page on the rule (age + 10)/4: 7.5 at 20 years", 7.5, 1e-9, ("age", 20, "a"), ("rule", "(age+10)/4")),
    ];

    /// <summary>Age in years; rule one of the codes of the input.</summary>
    public static double Of(double age, string rule) => rule switch
    {
        "age/4+4" => (age / 4) + 4,
        "(age+10)/4" => (age + 10) / 4,
        _ => 2.5 + (0.21 * age),
    };
}
