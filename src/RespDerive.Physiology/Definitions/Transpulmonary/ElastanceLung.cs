using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Elastance of the lung alone.</summary>
/// <remarks>
/// EL = Ers − Ecw. Elastances add up; compliances do not.
/// </remarks>
public sealed class ElastanceLung : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("elastance-lung", "EL", "static elastance of the lung", "cm[H2O]/L", 3, 400, Tolerance.Deviation(0, 0.25, "typical"),
        [new Slot(Elastance.Value, new Pairing.AnchorItself()), new Slot(ElastanceChestWall.Value, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(2)))],
        x => Of(x[Elastance.Value], x[ElastanceChestWall.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Elastance of the respiratory system minus that of the chest wall.";

    /// <inheritdoc/>
    public override string Equation => "EL = Ers − Ecw";

    /// <inheritdoc/>
    public override string Assumptions => "As for the elastances of respiratory system and chest wall, of one breath.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. With set PEEP and unseen intrinsic PEEP it reads falsely high.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (10, 50);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]) { OnlyWith = [Kinds.EsophagealEndInspiratory, Kinds.EsophagealEndExpiratory] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 10, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")] },
        ElastanceChestWall.Swing with { TrippedBy = [("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 12.5, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")] },
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
        new(Evidence.Limit, "exact on paper: (30 − 10)/0.4 − (18 − 12)/0.4 = 50 − 15", 35, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")),
        new(Evidence.Limit, "from the two elastances: 24 − 6", 18, 1e-9, ("Ers", 24, "cm[H2O]/L"), ("Ecw", 6, "cm[H2O]/L")),
    ];

    private static Given[] Example => [("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")];

    /// <summary>Both in cm[H2O]/L.</summary>
    public static double Of(double respiratorySystem, double chestWall) => respiratorySystem - chestWall;
}
