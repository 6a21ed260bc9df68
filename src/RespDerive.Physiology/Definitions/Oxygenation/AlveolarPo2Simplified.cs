using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen tension in an ideal alveolus, from the short alveolar gas equation.</summary>
/// <remarks>
/// PAO2 = FiO2·(PB − PH2O) − PaCO2/R. All pressures in mm[Hg]; R is the respiratory exchange ratio.
/// Leaves out PaCO2·FiO2·(1 − R)/R and so under-reads: by 2 mm[Hg] on air, by 10 on pure oxygen (PaCO2 40, R 0.8).
/// </remarks>
public sealed class AlveolarPo2Simplified : Definition
{
    private static Slot Anchor => new(Kinds.PaCO2, new Pairing.AnchorItself());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("alveolar-po2-simplified", "PAO2simple", "alveolar oxygen partial pressure, short equation", "mm[Hg]", 20, 700,
        Tolerance.Deviation(3, 0, "typical on air"), [Anchor, Slots.FiO2, Slots.BarometricPressure, Slots.WaterVapour, Slots.RespiratoryQuotient],
        x => Of(x[Slots.FiO2], x[Slots.BarometricPressure], x[Slots.WaterVapour], x[Kinds.PaCO2], x[Slots.RespiratoryQuotient]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Ideal alveolar oxygen tension from the short alveolar gas equation; the full one is preferred.";

    /// <inheritdoc/>
    public override string Equation => "PAO2simple = FiO2·(PB − PH2O) − PaCO2/R";

    /// <inheritdoc/>
    public override string Assumptions => "As for alveolar PO2, and a small inspired fraction: the term left out grows with FiO2. Used by no other value here.";

    /// <inheritdoc/>
    public override string Caution => "Under-reads by 2 to 10 mm[Hg]; prefer alveolar-po2. Rests on an assumed exchange ratio and on the site's barometric pressure.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (60, 670);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide,
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Fenn WO, Rahn H, Otis AB. Am J Physiol 1946;146:637 (from memory; the full equation of which this is the short form)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: air, PaCO2 40", 99.73, 0.005, ("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PH2O", 47, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("R", 0.8, "1")),
        new(Evidence.Limit, "with R = 1 the short and the full equation agree: 760 − 47 − 40 on pure oxygen", 673, 1e-9, ("FiO2", 1, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("R", 1, "1")),
    ];

    private static Given[] Example => [("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>The short equation; pressures in mm[Hg], FiO2 a fraction.</summary>
    public static double Of(double fio2, double pb, double ph2o, double paco2, double r) => (fio2 * (pb - ph2o)) - (paco2 / r);
}
