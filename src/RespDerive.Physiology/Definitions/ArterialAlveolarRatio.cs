using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ratio of arterial to alveolar oxygen tension.</summary>
/// <remarks>
/// a/A = PaO2 / PAO2, with PAO2 from the full alveolar gas equation on the same sample.
/// Steadier across FiO2 than the difference. Small a over capital A: never inverted.
/// </remarks>
public sealed class ArterialAlveolarRatio : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("arterial-alveolar-ratio", "aAratio", "ratio of arterial to alveolar oxygen tension", "1", 0.02, 1.05,
        Tolerance.Deviation(0, 0.07, "typical"), [Slots.PaO2, new Slot(AlveolarPo2.Value, new Pairing.SameSample())],
        x => Of(x[Slots.PaO2], x[AlveolarPo2.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override IReadOnlyList<string> Aliases => ["aa-ratio"];

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Arterial divided by alveolar oxygen tension (a/A ratio).";

    /// <inheritdoc/>
    public override string Equation => "aAratio = PaO2 / PAO2";

    /// <inheritdoc/>
    public override string Assumptions => "As for alveolar PO2; both gases from one sample.";

    /// <inheritdoc/>
    public override string Caution => "Rests on an assumed exchange ratio and on the site's barometric pressure. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.05, 1);

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
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Loinc("78354-8", "Arterial-alveolar oxygen Partial pressure ratio")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Gilbert R, Keighley JF. The arterial-alveolar oxygen tension ratio. Am Rev Respir Dis 1974;109:142 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "one when arterial equals alveolar", 1, 1e-9, ("PaO2", 100, "mm[Hg]"), ("PAO2", 100, "mm[Hg]")),
        new(Evidence.Limit, "on pure oxygen R drops out: 336.5 / (760 − 47 − 40)", 0.5, 1e-9, ("PaO2", 336.5, "mm[Hg]"), ("FiO2", 1, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>Both in mm[Hg].</summary>
    public static double Of(double arterial, double alveolar) => arterial / alveolar;
}
