using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Alveolar-arterial oxygen difference in units of the arterial tension.</summary>
/// <remarks>
/// RI = (PAO2 − PaO2) / PaO2 = 1/(a/A) − 1, with PAO2 from the full alveolar gas equation on the same sample.
/// Not a breath rate.
/// </remarks>
public sealed class RespiratoryIndex : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("respiratory-index", "RI", "respiratory index", "1", -0.05, 30,
        Tolerance.Deviation(0, 0.08, "typical"), [Slots.PaO2, new Slot(AlveolarPo2.Value, new Pairing.SameSample())],
        x => Of(x[AlveolarPo2.Value], x[Slots.PaO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Alveolar-arterial oxygen difference divided by arterial oxygen tension.";

    /// <inheritdoc/>
    public override string Equation => "RI = (PAO2 − PaO2) / PaO2";

    /// <inheritdoc/>
    public override string Assumptions => "As for alveolar PO2; both gases from one sample. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Rests on an assumed exchange ratio and on the site's barometric pressure. Not a diagnosis, and not a breath rate.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 0.4);

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
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Goldfarb MA et al. Tracking respiratory therapy in the trauma patient. Am J Surg 1975;129:255 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "zero when arterial equals alveolar", 0, 1e-9, ("PaO2", 100, "mm[Hg]"), ("PAO2", 100, "mm[Hg]")),
        new(Evidence.Limit, "identity 1/(a/A) − 1: at a ratio of one half the index is one; (760 − 47 − 40)/2 on pure oxygen", 1, 1e-9, ("PaO2", 336.5, "mm[Hg]"), ("FiO2", 1, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>Both in mm[Hg].</summary>
    public static double Of(double alveolar, double arterial) => (alveolar - arterial) / arterial;
}
