using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Alveolar ventilation that would hold PaCO2 at a target.</summary>
/// <remarks>0.863·VCO2/target. Only by hand, never published.</remarks>
public sealed class AlveolarVentilationForTarget : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("alveolar-ventilation-for-target-paco2", "VAtarget", "alveolar ventilation for a target PaCO2 (BTPS)", "L/min", 0.5, 40,
        Tolerance.Deviation(0, 0.11, "typical"), [CarbonDioxideSlots.Production, CarbonDioxideSlots.Target, CarbonDioxideSlots.Conversion],
        x => AlveolarVentilation.Of(x[CarbonDioxideSlots.Conversion], x[CarbonDioxideSlots.Production], x[CarbonDioxideSlots.Target]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Targets";

    /// <inheritdoc/>
    public override string Summary => "Alveolar ventilation at which PaCO2 would be at a target.";

    /// <inheritdoc/>
    public override string Equation => "VAtarget = factor·VCO2/PaCO2target";

    /// <inheritdoc/>
    public override string Assumptions => "Carbon dioxide production unchanged; steady state. Constant: 0.863 mm[Hg]·L/mL. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Arithmetic on charted values, never an order: local policy and licensed clinicians decide. Says nothing of the dead space that must be ventilated as well.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (3, 10);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["target"] = Kinds.PaCO2Target };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Factor 0.863 = 760·310.15/273.15/1000 mm[Hg]·L/mL (760 mm[Hg], 37 °C, 0 °C): gas laws; West JB. Respiratory Physiology, chapter on ventilation (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "1000 mL/min at 43.15 mm[Hg]: 863/43.15", 20, 1e-9,
            ("VCO2", 1000, "mL/min"), ("PaCO2target", 43.15, "mm[Hg]"), ("factor", 0.863, "mm[Hg].L/mL")),
        new(Evidence.Limit, "half the tension takes twice the ventilation", 8.63, 1e-9,
            ("VCO2", 200, "mL/min"), ("PaCO2target", 20, "mm[Hg]")),
    ];
}
