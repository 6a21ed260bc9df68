using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Elastance of the chest wall.</summary>
/// <remarks>
/// Ecw = 1000·(Pes_ei − Pes_ee) / VT, VT in mL. Elastances of lung and chest wall add up to that of the respiratory system.
/// </remarks>
public sealed class ElastanceChestWall : Definition
{
    private static readonly Pairing.SameManoeuvre SameBreath = new(TimeSpan.FromMinutes(2));

    private static readonly Slot Inspiratory = new(Kinds.EsophagealEndInspiratory, new Pairing.AnchorItself());

    private static readonly Slot Expiratory = new(Kinds.EsophagealEndExpiratory, SameBreath);

    /// <summary>A swing under 1 cm[H2O] is not told from noise.</summary>
    internal static readonly Gate Swing = new(Withheld.UncertaintyTooLarge, "the esophageal pressure swings by less than 1 cm[H2O]", [],
        x => x.Has(Inspiratory) && x.Has(Expiratory) && x[Inspiratory] - x[Expiratory] < 1,
        ("Pes_ei", 12.5, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 400, "mL"));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("elastance-chest-wall", "Ecw", "static elastance of the chest wall", "cm[H2O]/L", 3, 400,
        Tolerance.Deviation(0, 0.25, "typical"), [Inspiratory, Expiratory, Slots.TidalVolume],
        x => Of(x[Inspiratory], x[Expiratory], x[Slots.TidalVolume]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Transpulmonary pressure";

    /// <inheritdoc/>
    public override string Summary => "Swing of the esophageal pressure divided by tidal volume.";

    /// <inheritdoc/>
    public override string Equation => "Ecw = 1000·(Pes_ei − Pes_ee) / VT";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, both pressures without flow and of one breath with the volume. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution =>
        "Needs a well-placed esophageal balloon, confirmed by an occlusion test; its artefacts and filling move the number by "
        + "several cm[H2O]. No agreed threshold. With patient effort it means nothing.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (10, 50);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.EsophagealEndInspiratory]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        Swing,
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
        new(Evidence.Limit, "exact on paper: (18 − 12) / 0.4 L", 15, 1e-9, ("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 0.4, "L")),
    ];

    private static Given[] Example => [("Pes_ei", 18, "cm[H2O]"), ("Pes_ee", 12, "cm[H2O]"), ("VT", 400, "mL")];

    /// <summary>Pressures in cm[H2O], volume in mL.</summary>
    public static double Of(double inspiratory, double expiratory, double volume) => 1000 * (inspiratory - expiratory) / volume;
}
