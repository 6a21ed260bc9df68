using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Difference between alveolar and arterial oxygen tension.</summary>
/// <remarks>A-a = PAO2 − PaO2, with PAO2 from the full alveolar gas equation on the same sample. Rises with FiO2 in normal lungs.</remarks>
public sealed class AaGradient : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("aa-gradient", "AaDO2", "alveolar-arterial oxygen difference", "mm[Hg]", -10, 680,
        Tolerance.Deviation(5, 0, "typical on air"), [Slots.PaO2, new Slot(AlveolarPo2.Value, new Pairing.SameSample())],
        x => Of(x[AlveolarPo2.Value], x[Slots.PaO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Alveolar minus arterial oxygen tension (A-a gradient).";

    /// <inheritdoc/>
    public override string Equation => "AaDO2 = PAO2 − PaO2";

    /// <inheritdoc/>
    public override string Assumptions => "As for alveolar PO2; both gases from one sample. Not comparable across FiO2.";

    /// <inheritdoc/>
    public override string Caution => "Rests on an assumed exchange ratio and on the site's barometric pressure; rises with FiO2 in normal lungs.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 600);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar,
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes => [StandardCode.Loinc("19991-9", "Alveolar-arterial oxygen Partial pressure difference")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Fenn WO, Rahn H, Otis AB. Am J Physiol 1946;146:637 (from memory)"),
        new("Crapo RO et al. Arterial blood gas reference values for sea level and an altitude of 1,400 meters. Am J Respir Crit Care Med 1999;160:1525"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "pure hypoventilation leaves the difference near normal: 0.21·713 − 80·(0.21 + 0.79/0.8) − 40", 13.93, 0.005,
            ("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 80, "mm[Hg]"), ("PaO2", 40, "mm[Hg]"), ("R", 0.8, "1")),
        new(Evidence.Limit, "no difference when arterial equals alveolar", 0, 1e-9, ("PAO2", 100, "mm[Hg]"), ("PaO2", 100, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>Both in mm[Hg].</summary>
    public static double Of(double alveolar, double arterial) => alveolar - arterial;
}
