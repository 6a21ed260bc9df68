using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen tension in an ideal alveolus, from the full alveolar gas equation.</summary>
/// <remarks>
/// PAO2 = FiO2·(PB − PH2O) − PaCO2·(FiO2 + (1 − FiO2)/R). All pressures in mm[Hg]; R is the respiratory exchange ratio.
/// Steady state, no inspired CO2 or nitrous oxide. The short form without the FiO2 term under-reads by 2 to 10 mm[Hg] and is not used.
/// </remarks>
public sealed class AlveolarPo2 : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("alveolar-po2", "PAO2", "alveolar oxygen partial pressure", "mm[Hg]", 20, 700,
        Tolerance.Deviation(3, 0, "typical on air"), [Anchor, Slots.FiO2, Slots.BarometricPressure, Slots.WaterVapour, Slots.RespiratoryQuotient],
        x => Of(x[Slots.FiO2], x[Slots.BarometricPressure], x[Slots.WaterVapour], x[Kinds.PaCO2], x[Slots.RespiratoryQuotient]));

    private static Slot Anchor => new(Kinds.PaCO2, new Pairing.AnchorItself());

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Ideal alveolar oxygen tension from the full alveolar gas equation.";

    /// <inheritdoc/>
    public override string Equation => "PAO2 = FiO2·(PB − PH2O) − PaCO2·(FiO2 + (1 − FiO2)/R)";

    /// <inheritdoc/>
    public override string Assumptions => "Steady state; no inspired CO2 or nitrous oxide; arterial stands for alveolar PCO2; R assumed unless measured; PB 240 to 800 mm[Hg].";

    /// <inheritdoc/>
    public override string Caution => "Rests on an assumed exchange ratio and on the site's barometric pressure.";

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
        [new("Fenn WO, Rahn H, Otis AB. A theoretical study of the composition of the alveolar air at altitude. Am J Physiol 1946;146:637 (from memory)")];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "public encyclopaedia sample values of the alveolar gas equation: 0.21, 760, 47, 36, 0.8 give 107", 107, 0.5,
            ("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PH2O", 47, "mm[Hg]"), ("PaCO2", 36, "mm[Hg]"), ("R", 0.8, "1")),
        new(Evidence.Limit, "on pure oxygen R drops out: 760 − 47 − 40", 673, 1e-9, ("FiO2", 1, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>The full equation; pressures in mm[Hg], FiO2 a fraction.</summary>
    public static double Of(double fio2, double pb, double ph2o, double paco2, double r) => (fio2 * (pb - ph2o)) - (paco2 * (fio2 + ((1 - fio2) / r)));
}
