using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Pressure that distends the lung alone in a breath.</summary>
/// <remarks>
/// dPL = PLei − PLee: the driving pressure less the swing of the esophageal pressure. The filling of the balloon, alike in both, cancels.
/// </remarks>
public sealed class TranspulmonaryDrivingPressure : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("transpulmonary-driving-pressure", "dPL", "transpulmonary driving pressure", "cm[H2O]", -30, 60, Tolerance.Deviation(3.5, 0, "typical"),
        [
            new Slot(TranspulmonaryEndInspiratory.Value, new Pairing.AnchorItself()),
            new Slot(TranspulmonaryEndExpiratory.Value, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(2))),
        ],
        x => Of(x[TranspulmonaryEndInspiratory.Value], x[TranspulmonaryEndExpiratory.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Transpulmonary pressure at end-inspiration minus that at end-expiration.";

    /// <inheritdoc/>
    public override string Equation => "dPL = PLei − PLee";

    /// <inheritdoc/>
    public override string Assumptions => "As for the two pressures; both of one breath. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. With set PEEP and unseen intrinsic PEEP it reads falsely high; with patient effort "
        + "it is not defined by these pressures.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (2, 15);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]) { OnlyWith = [Kinds.EsophagealEndInspiratory, Kinds.EsophagealEndExpiratory] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 10, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")] },
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
        new(Evidence.Limit, "exact on paper: (30 − 18) − (10 − 12)", 14, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")),
        new(Evidence.Limit, "no esophageal swing leaves the whole driving pressure: (24 − 10) − (12 − 12)", 14, 1e-9, ("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 12, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")),
    ];

    private static Given[] Example => [("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]")];

    /// <summary>Both in cm[H2O].</summary>
    public static double Of(double endInspiratory, double endExpiratory) => endInspiratory - endExpiratory;
}
