using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ratio of pulse-oximetry saturation to inspired oxygen fraction: oxygenation without a blood sample.</summary>
/// <remarks>
/// S/F = SpO2 (%) / FiO2 (fraction). Says little above an SpO2 of 97 %, where the dissociation curve is flat.
/// Pulse oximetry reads too high in dark skin and with carboxyhaemoglobin.
/// </remarks>
public sealed class SfRatio : Definition
{
    private static readonly Slot Anchor = new(Kinds.SpO2, new Pairing.AnchorItself());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("sf-ratio", "SF", "ratio of oxygen saturation by pulse oximetry to inspired oxygen fraction", "%", 40, 480,
        Tolerance.Deviation(0, 0.05, "typical"), [Anchor, Slots.FiO2], x => Of(x[Anchor], x[Slots.FiO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Oxygen saturation by pulse oximetry divided by the inspired oxygen fraction (S/F ratio).";

    /// <inheritdoc/>
    public override string Equation => "SF = SpO2 / FiO2";

    /// <inheritdoc/>
    public override string Assumptions => "SpO2 in percent with a good signal; FiO2 delivered at that time. Informative up to an SpO2 of 97 %.";

    /// <inheritdoc/>
    public override string Caution => "Pulse oximetry overestimates in dark skin, poor perfusion and with carboxyhaemoglobin. Not a diagnosis; not a P/F ratio.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (80, 470);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.SpO2], Cadence.QuarterHour) { OnlyWith = [Kinds.FiO2Measured, Kinds.FiO2Set, Kinds.FiO2, Kinds.OxygenFlow] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Ecls with { TrippedBy = [("SpO2", 92, "%"), ("FiO2", 0.4, "1"), ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [new FlagRule(Flags.Spo2Above97, [], x => x[Anchor] > 97)];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Rice TW et al. Comparison of the SpO2/FIO2 ratio and the PaO2/FIO2 ratio in patients with acute lung injury or ARDS. Chest 2007;132:410, abstract"),
        new("Pulse oximetry accuracy and its limits: ISO 80601-2-61 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "teaching pages on the S/F ratio: 92 on 36 % is printed as 255 (truncated from 255.6)", 255.6, 0.7, ("SpO2", 92, "%"), ("FiO2", 0.36, "1")),
        new(Evidence.Published, "teaching pages on the S/F ratio: 90 on 28 % is printed as 321", 321.4, 0.6, ("SpO2", 90, "%"), ("FiO2", 0.28, "1")),
        new(Evidence.Limit, "on pure oxygen the ratio is the saturation", 90, 1e-9, ("SpO2", 90, "%"), ("FiO2", 1, "1")),
    ];

    /// <summary>SpO2 (%) over FiO2 (fraction).</summary>
    public static double Of(double spo2, double fio2) => spo2 / fio2;
}
