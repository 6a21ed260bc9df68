using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Dead space fraction with carbon dioxide production estimated instead of measured.</summary>
/// <remarks>VD/VT = 1 − 0.863·VCO2est/(VE·PaCO2). Good for a trend at most: the estimate of VCO2 errs by about 20 %.</remarks>
public sealed class DeadSpaceFractionEstimated : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dead-space-fraction-estimated", "VDVTest", "dead space over tidal volume, estimated", "1", 0, 0.95,
        Tolerance.Deviation(0.1, 0, "typical"),
        [CarbonDioxideSlots.PaCO2, CarbonDioxideSlots.Ventilation, new Slot(Vco2Estimated.Value, new Pairing.Standing()), CarbonDioxideSlots.Conversion],
        x => Of(x[CarbonDioxideSlots.Conversion], x[Vco2Estimated.Value], x[CarbonDioxideSlots.Ventilation], x[CarbonDioxideSlots.PaCO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Dead space fraction from PaCO2 and ventilation with an estimated carbon dioxide production.";

    /// <inheritdoc/>
    public override string Equation => "VDVTest = 1 − factor·VCO2est/(VE·PaCO2)";

    /// <inheritdoc/>
    public override string Assumptions => "As for the estimated carbon dioxide production; steady state; ventilation of the 15 min before the draw. Constant: 0.863 mm[Hg]·L/mL. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "An estimate: fever and feeding move it as much as dead space does. For a trend, not for a threshold. Adults only. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.3, 0.7);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = Slots.Ventilated };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CarbonDioxideGates.NoMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        new Gate(Withheld.SexUnknown, "the sex is unknown", [], x => x.Code(Kinds.Sex) == "unknown" && !x.Has(Vco2Estimated.Value),
            [.. Gases, ("weight", 70, "kg"), ("height", 175, "cm"), ("age", 60, "a"), ("sex", "unknown")]),
        CommonGates.Adult with { TrippedBy = [.. Gases, ("weight", 40, "kg"), ("height", 150, "cm"), ("age", 12, "a"), ("sex", "male")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Siddiki H et al. Bedside quantification of dead-space fraction using routine clinical data in patients with acute lung injury. Crit Care 2010;14:R141 (form; prints 0.86)"),
        new("Morales-Quinteros L et al. Estimated dead space fraction and the ventilatory ratio are associated with mortality in early ARDS. Ann Intensive Care 2019;9:128 (Harris-Benedict variant not associated)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "1 − 0.863·200/(8.63·40)", 0.5, 1e-9,
            ("PaCO2", 40, "mm[Hg]"), ("VE", 8.63, "L/min"), ("VCO2est", 200, "mL/min"), ("factor", 0.863, "mm[Hg].L/mL")),
        new(Evidence.Limit, "all of the ventilation needed: no dead space", 0, 1e-9,
            ("PaCO2", 43.15, "mm[Hg]"), ("VE", 4, "L/min"), ("VCO2est", 200, "mL/min"), ("factor", 0.863, "mm[Hg].L/mL")),
    ];

    private static Given[] Example => [.. Gases, ("VCO2est", 200, "mL/min")];

    private static Given[] Gases => [("PaCO2", 48, "mm[Hg]"), ("VE", 9, "L/min")];

    /// <summary>Factor in mm[Hg]·L/mL, production in mL/min, ventilation in L/min, PaCO2 in mm[Hg].</summary>
    public static double Of(double factor, double production, double ventilation, double paco2) => 1 - (factor * production / (ventilation * paco2));
}
