using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Pressure across the lung at the end of expiration.</summary>
/// <remarks>
/// PLee = PEEPtot − Pes at end-expiration. Below zero the lung around the balloon tends to collapse.
/// </remarks>
public sealed class TranspulmonaryEndExpiratory : Definition
{
    private static readonly Slot Anchor = new(Kinds.EsophagealEndExpiratory, new Pairing.AnchorItself());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("transpulmonary-pressure-end-expiratory", "PLee", "transpulmonary pressure at end-expiration", "cm[H2O]", -30, 60,
        Tolerance.Deviation(3.5, 0, "typical"), [Slots.Peep, Anchor], x => Of(x[Slots.Peep], x[Anchor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Total PEEP minus esophageal pressure at end-expiration.";

    /// <inheritdoc/>
    public override string Equation => "PLee = PEEPtot − Pes_ee";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, total PEEP of an end-expiratory hold; directly measured esophageal pressure, no correction for filling.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. With set PEEP and unseen intrinsic PEEP it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 6);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.EsophagealEndExpiratory]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Akoumianaki E et al. The application of esophageal pressure measurement in patients with respiratory failure. Am J Respir Crit Care Med 2014;189:520 (from memory)"),
        new("Mauri T et al. Esophageal and transpulmonary pressure in the clinical setting: meaning, usefulness and perspectives. Intensive Care Med 2016;42:1360 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 10 − 12", -2, 1e-9, ("PEEPtot", 10, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")),
    ];

    private static Given[] Example => [("PEEPtot", 10, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")];

    /// <summary>Both in cm[H2O].</summary>
    public static double Of(double peep, double esophageal) => peep - esophageal;
}
