using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ventilation that takes part in gas exchange.</summary>
/// <remarks>VA = 0.863·VCO2/PaCO2; by hand also (VT − VD)·RR, the same where dead space is what it is taken for.</remarks>
public sealed class AlveolarVentilation : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("alveolar-ventilation", "VA", "alveolar ventilation (BTPS)", "L/min", 0.5, 40,
        Tolerance.Deviation(0, 0.11, "typical"), [CarbonDioxideSlots.PaCO2, CarbonDioxideSlots.Production, CarbonDioxideSlots.Conversion], Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Alveolar ventilation from carbon dioxide production and arterial tension.";

    /// <inheritdoc/>
    public override string Equation => "VA = factor·VCO2/PaCO2 (= (VT − VD)·RR/1000)";

    /// <inheritdoc/>
    public override string Assumptions => "Steady state; PaCO2 stands for alveolar PCO2; VCO2 at STPD, the result at BTPS (37 °C). Constant: 0.863 mm[Hg]·L/mL. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Needs a measured carbon dioxide production. Wrong while carbon dioxide stores fill or empty (20 to 30 min after a change). Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (3.5, 6);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = [Kinds.CO2Production] };

    /// <inheritdoc/>
    public override IReadOnlyList<Slot> ByIdentity => [Slots.TidalVolume, new Slot(Kinds.DeadSpaceVolume, new Pairing.ByHand()), new Slot(Kinds.RateTotal, new Pairing.ByHand())];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Factor 0.863 = 760·310.15/273.15/1000 mm[Hg]·L/mL (760 mm[Hg], 37 °C, 0 °C): gas laws; West JB. Respiratory Physiology, chapter on ventilation (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 0.863·200/40", 4.315, 1e-9,
            ("VCO2", 200, "mL/min"), ("PaCO2", 40, "mm[Hg]"), ("factor", 0.863, "mm[Hg].L/mL")),
        new(Evidence.Limit, "exact on paper: (500 − 150)·12/1000", 4.2, 1e-9,
            ("VT", 500, "mL"), ("VD", 150, "mL"), ("RR", 12, "/min")),
        new(Evidence.Limit, "tension and ventilation are inverse: twice the tension, half the ventilation", 2.1575, 1e-9,
            ("VCO2", 200, "mL/min"), ("PaCO2", 80, "mm[Hg]")),
    ];

    private static Given[] Example => [("VCO2", 200, "mL/min"), ("PaCO2", 40, "mm[Hg]")];

    /// <summary>Factor in mm[Hg]·L/mL, production in mL/min (STPD), tension in mm[Hg].</summary>
    public static double Of(double factor, double production, double tension) => factor * production / tension;

    private static double Compute(Roots x) => Value.ComputableFrom(x)
        ? Of(x[CarbonDioxideSlots.Conversion], x[CarbonDioxideSlots.Production], x[CarbonDioxideSlots.PaCO2])
        : (x[Slots.TidalVolume] - x[Kinds.DeadSpaceVolume]) * x[Kinds.RateTotal] / 1000;
}
