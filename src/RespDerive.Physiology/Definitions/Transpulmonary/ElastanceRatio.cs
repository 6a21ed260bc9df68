using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Part of the elastance of the respiratory system that is the lung's.</summary>
/// <remarks>
/// ELratio = EL / Ers: the part of the airway pressure that is borne by the lung.
/// </remarks>
public sealed class ElastanceRatio : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("elastance-ratio", "ELratio", "lung over respiratory system elastance", "1", 0.1, 1, Tolerance.Deviation(0.1, 0, "typical"),
        [new Slot(Elastance.Value, new Pairing.AnchorItself()), new Slot(ElastanceLung.Value, new Pairing.AnchorItself())],
        x => Of(x[ElastanceLung.Value], x[Elastance.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Elastance of the lung divided by that of the respiratory system.";

    /// <inheritdoc/>
    public override string Equation => "ELratio = EL / Ers";

    /// <inheritdoc/>
    public override string Assumptions => "As for the elastance of the lung; 0.2 to 0.95 in patients.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. With set PEEP and unseen intrinsic PEEP it reads falsely high.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.6, 0.85);

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
        new(Evidence.Limit, "exact on paper: 35 / 50, which is (20 − 6) / 20", 0.7, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")),
        new(Evidence.Limit, "from the two elastances: 18 / 24", 0.75, 1e-9, ("EL", 18, "cm[H2O]/L"), ("Ers", 24, "cm[H2O]/L")),
    ];

    private static Given[] Example => [("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")];

    /// <summary>Both in cm[H2O]/L.</summary>
    public static double Of(double lung, double respiratorySystem) => lung / respiratorySystem;
}
