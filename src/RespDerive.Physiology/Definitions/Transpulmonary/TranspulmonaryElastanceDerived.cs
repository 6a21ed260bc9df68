using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Pressure across the lung at end-inspiration from the plateau and the lung's part of the elastance; also called lung stress.</summary>
/// <remarks>
/// PLel = Pplat·EL/Ers. Speaks for the non-dependent lung; needs only the swing of the esophageal pressure, not its absolute height.
/// Lung stress is the same number under another name; strain would need the lung volume at rest.
/// </remarks>
public sealed class TranspulmonaryElastanceDerived : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("transpulmonary-pressure-elastance-derived", "PLel", "elastance-derived transpulmonary pressure at end-inspiration (lung stress)", "cm[H2O]", -30, 60,
        Tolerance.Deviation(3.5, 0, "typical"),
        [Slots.Plateau, new Slot(Elastance.Value, new Pairing.AnchorItself()), new Slot(ElastanceLung.Value, new Pairing.AnchorItself())],
        x => Of(x[Slots.Plateau], x[ElastanceLung.Value], x[Elastance.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override IReadOnlyList<string> Aliases => ["lung-stress"];

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Plateau pressure times the lung's part of the elastance.";

    /// <inheritdoc/>
    public override string Equation => "PLel = Pplat·EL / Ers";

    /// <inheritdoc/>
    public override string Assumptions =>
        "As for the elastance of the lung; elastances constant down to zero airway pressure. The directly measured pressure "
        + "differs by the resting height of the esophageal pressure.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. State the method: it is not the directly measured pressure. With set PEEP and "
        + "unseen intrinsic PEEP it reads falsely high.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 25);

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
        new("Chiumello D et al. Lung stress and strain during mechanical ventilation for acute respiratory distress syndrome. Am J Respir Crit Care Med 2008;178:346 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 30·35/50", 21, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")),
        new(Evidence.Limit, "from the two elastances: 28·18/24", 21, 1e-9, ("Pplat", 28, "cm[H2O]"), ("EL", 18, "cm[H2O]/L"), ("Ers", 24, "cm[H2O]/L")),
    ];

    private static Given[] Example => [("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")];

    /// <summary>Plateau pressure in cm[H2O], elastances in cm[H2O]/L.</summary>
    public static double Of(double plateau, double lung, double respiratorySystem) => plateau * lung / respiratorySystem;
}
