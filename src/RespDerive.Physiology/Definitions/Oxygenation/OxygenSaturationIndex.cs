using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygenation weighed against mean airway pressure, without a blood sample.</summary>
/// <remarks>
/// OSI = 100·FiO2·Pmean / SpO2, Pmean in cm[H2O] and SpO2 in percent; by convention without a unit.
/// Says little above an SpO2 of 97 %, where the dissociation curve is flat.
/// </remarks>
public sealed class OxygenSaturationIndex : Definition
{
    private static readonly Slot Anchor = new(Kinds.SpO2, new Pairing.AnchorItself());

    private static readonly Slot MeanPressure = new(Kinds.MeanAirway, new Pairing.MedianOver(TimeSpan.FromMinutes(5), TimeSpan.FromMinutes(5), 1));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-saturation-index", "OSI", "oxygen saturation index", "1", 0.3, 100,
        Tolerance.Deviation(0, 0.11, "typical"), [Anchor, Slots.FiO2, MeanPressure], x => Of(x[Slots.FiO2], x[MeanPressure], x[Anchor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Mean airway pressure times inspired oxygen percentage over oxygen saturation by pulse oximetry.";

    /// <inheritdoc/>
    public override string Equation => "OSI = 100·FiO2·Pmean / SpO2";

    /// <inheritdoc/>
    public override string Assumptions => "Invasive ventilation; mean airway pressure measured (median over ±5 min); SpO2 with a good signal. Informative up to an SpO2 of 97 %.";

    /// <inheritdoc/>
    public override string Caution => "Pulse oximetry overestimates in dark skin, poor perfusion and with carboxyhaemoglobin. Not a diagnosis; not the oxygenation index.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (1, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.SpO2], Cadence.QuarterHour) { OnlyWith = [Kinds.MeanAirway] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        new Gate(Withheld.WrongMode, "mean airway pressure is not comparable in non-invasive ventilation", [Kinds.Support],
            x => x.Code(Kinds.Support) == "non-invasive ventilation", [.. Example, ("support", "non-invasive ventilation")]),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [new FlagRule(Flags.Spo2Above97, [], x => x[Anchor] > 97)];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Pediatric Acute Lung Injury Consensus Conference Group. Pediatric acute respiratory distress syndrome. Pediatr Crit Care Med 2015;16:428 (form of the index)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 100·0.6·15 / 90", 10, 1e-9, ("FiO2", 0.6, "1"), ("Pmean", 15, "cm[H2O]"), ("SpO2", 90, "%")),
        new(Evidence.Limit, "at a mean pressure of 10 the index is 1000 over the S/F ratio: 1000 / 200", 5, 1e-9, ("FiO2", 0.45, "1"), ("Pmean", 10, "cm[H2O]"), ("SpO2", 90, "%")),
    ];

    private static Given[] Example => [("SpO2", 92, "%"), ("FiO2", 0.6, "1"), ("Pmean", 15, "cm[H2O]")];

    /// <summary>FiO2 a fraction, mean airway pressure in cm[H2O], SpO2 in percent.</summary>
    public static double Of(double fio2, double mean, double spo2) => 100 * fio2 * mean / spo2;
}
