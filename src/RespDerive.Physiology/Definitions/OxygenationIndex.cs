using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygenation weighed against the mean airway pressure spent on it.</summary>
/// <remarks>
/// OI = 100·FiO2·Pmean / PaO2, Pmean in cm[H2O] and PaO2 in mm[Hg]; by convention without a unit.
/// Some texts call the P/F ratio oxygenation index; this is not it.
/// </remarks>
public sealed class OxygenationIndex : Definition
{
    private static readonly Slot MeanPressure = new(Kinds.MeanAirway, new Pairing.MedianOver(TimeSpan.FromMinutes(5), TimeSpan.FromMinutes(5), 1));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygenation-index", "OI", "oxygenation index", "1", 0.3, 150,
        Tolerance.Deviation(0, 0.12, "typical"), [Slots.PaO2, Slots.FiO2, MeanPressure],
        x => Of(x[Slots.FiO2], x[MeanPressure], x[Slots.PaO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Mean airway pressure times inspired oxygen percentage over arterial oxygen tension.";

    /// <inheritdoc/>
    public override string Equation => "OI = 100·FiO2·Pmean / PaO2";

    /// <inheritdoc/>
    public override string Assumptions => "Invasive ventilation; mean airway pressure measured (median over ±5 min of the draw); arterial sample at 37 °C; FiO2 steady before the draw.";

    /// <inheritdoc/>
    public override string Caution => "Not a diagnosis. Not meaningful with cyanotic heart disease; mean pressure is not peak pressure.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (1, 40);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.MeanAirway, .. Slots.Ventilated] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("Pmean", 15, "cm[H2O]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("PaO2", 180, "mm[Hg]"), ("FiO2", 0.21, "1"), ("Pmean", 15, "cm[H2O]"), ("PaCO2", 40, "mm[Hg]"), ("PB", 760, "mm[Hg]")] },
        new Gate(Withheld.WrongMode, "mean airway pressure is not comparable in non-invasive ventilation", [Kinds.Support],
            x => x.Code(Kinds.Support) == "non-invasive ventilation", [.. Example, ("support", "non-invasive ventilation")]),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Pediatric Acute Lung Injury Consensus Conference Group. Pediatric acute respiratory distress syndrome. Pediatr Crit Care Med 2015;16:428 (form of the index)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 100·0.6·15 / 60", 15, 1e-9, ("FiO2", 0.6, "1"), ("Pmean", 15, "cm[H2O]"), ("PaO2", 60, "mm[Hg]")),
        new(Evidence.Limit, "at a mean pressure of 10 the index is 1000 over the P/F ratio: 1000 / 200", 5, 1e-9, ("FiO2", 0.3, "1"), ("Pmean", 10, "cm[H2O]"), ("PaO2", 60, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("Pmean", 15, "cm[H2O]")];

    /// <summary>FiO2 a fraction, mean airway pressure in cm[H2O], PaO2 in mm[Hg].</summary>
    public static double Of(double fio2, double mean, double pao2) => 100 * fio2 * mean / pao2;
}
