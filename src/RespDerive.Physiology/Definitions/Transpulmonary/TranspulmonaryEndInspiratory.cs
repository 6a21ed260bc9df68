using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Pressure across the lung at the end of inspiration, without flow.</summary>
/// <remarks>
/// PLei = Pplat − Pes at end-inspiration. Speaks for the lung around the balloon, which is the dependent part.
/// </remarks>
public sealed class TranspulmonaryEndInspiratory : Definition
{
    private static readonly Slot Esophageal = new(Kinds.EsophagealEndInspiratory, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(2)));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("transpulmonary-pressure-end-inspiratory", "PLei", "transpulmonary pressure at end-inspiration", "cm[H2O]", -30, 60,
        Tolerance.Deviation(3.5, 0, "typical"), [Slots.Plateau, Esophageal], x => Of(x[Slots.Plateau], x[Esophageal]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Plateau pressure minus esophageal pressure at end-inspiration.";

    /// <inheritdoc/>
    public override string Equation => "PLei = Pplat − Pes_ei";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, plateau of an end-inspiratory hold, both pressures of one hold; directly measured esophageal pressure, no correction for filling.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. The elastance-derived pressure is another quantity and differs.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 20);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]) { OnlyWith = [Kinds.EsophagealEndInspiratory, Kinds.EsophagealEndExpiratory] };

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
        new(Evidence.Limit, "exact on paper: 30 − 18", 12, 1e-9, ("Pplat", 30, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]")),
    ];

    private static Given[] Example => [("Pplat", 30, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]")];

    /// <summary>Both in cm[H2O].</summary>
    public static double Of(double plateau, double esophageal) => plateau - esophageal;
}
