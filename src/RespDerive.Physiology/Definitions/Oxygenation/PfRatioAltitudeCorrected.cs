using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>P/F ratio scaled to the barometric pressure at sea level.</summary>
/// <remarks>
/// PFalt = PaO2 / FiO2 · PB / 760, all tensions in mm[Hg]. The Berlin definition asks for it above 1000 m, about 674 mm[Hg].
/// </remarks>
public sealed class PfRatioAltitudeCorrected : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("pf-ratio-altitude-corrected", "PFalt", "P/F ratio corrected for altitude", "mm[Hg]", 10, 740,
        Tolerance.Deviation(0, 0.07, "typical"), [Slots.PaO2, Slots.FiO2, Slots.BarometricPressure],
        x => Of(x[Slots.PaO2], x[Slots.FiO2], x[Slots.BarometricPressure]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "P/F ratio times barometric pressure over 760 mm[Hg].";

    /// <inheritdoc/>
    public override string Equation => "PFalt = PaO2 / FiO2 · PB / 760";

    /// <inheritdoc/>
    public override string Assumptions => "As for the P/F ratio; meant for altitudes above 1000 m (below about 674 mm[Hg]); lower down the plain ratio is used.";

    /// <inheritdoc/>
    public override string Caution => "Not a diagnosis. Not comparable with an uncorrected P/F ratio; check the barometric pressure, the source of FiO2 and the PEEP.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (50, 500);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 560, "mm[Hg]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar,
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("ARDS Definition Task Force. Berlin definition. JAMA 2012;307:2526, table 3, footnote on altitude", "10.1001/jama.2012.5669"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "at 760 mm[Hg] it is the P/F ratio: 60 / 0.30", 200, 1e-9, ("PaO2", 60, "mm[Hg]"), ("FiO2", 0.30, "1"), ("PB", 760, "mm[Hg]")),
        new(Evidence.Limit, "half at half the pressure: 60 / 0.30 / 2", 100, 1e-9, ("PaO2", 60, "mm[Hg]"), ("FiO2", 0.30, "1"), ("PB", 380, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 70, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 560, "mm[Hg]")];

    /// <summary>Tensions in mm[Hg], FiO2 a fraction.</summary>
    public static double Of(double pao2, double fio2, double pb) => pao2 / fio2 * pb / 760;
}
