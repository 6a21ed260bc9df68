using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Minute ventilation that would bring PaCO2 to a target.</summary>
/// <remarks>VE·PaCO2/target: ventilation and tension are inverse when production and dead space fraction stay. Only by hand, never published.</remarks>
public sealed class MinuteVentilationForTarget : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minute-ventilation-for-target-paco2", "VEtarget", "minute ventilation for a target PaCO2", "L/min", 0.5, 60,
        Tolerance.Deviation(0, 0.11, "typical"), [CarbonDioxideSlots.Ventilation, CarbonDioxideSlots.PaCO2, CarbonDioxideSlots.Target],
        x => Of(x[CarbonDioxideSlots.Ventilation], x[CarbonDioxideSlots.PaCO2], x[CarbonDioxideSlots.Target]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Targets";

    /// <inheritdoc/>
    public override string Summary => "Minute ventilation at which PaCO2 would reach a target, by proportion.";

    /// <inheritdoc/>
    public override string Equation => "VEtarget = VE·PaCO2/PaCO2target";

    /// <inheritdoc/>
    public override string Assumptions => "Carbon dioxide production and dead space fraction unchanged; steady state, reached 20 to 30 min after a change. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Arithmetic on charted values, never an order: local policy and licensed clinicians decide. A lower bound when it is reached by a faster rate with smaller breaths. Mind air trapping and raised intracranial pressure.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (3, 20);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["target"] = Kinds.PaCO2Target };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Consequence of the alveolar ventilation equation; common practice, no single source"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "the target already met: nothing changes", 8, 1e-9,
            ("VE", 8, "L/min"), ("PaCO2", 50, "mm[Hg]"), ("PaCO2target", 50, "mm[Hg]")),
        new(Evidence.Limit, "half the tension takes twice the ventilation", 12, 1e-9,
            ("VE", 6, "L/min"), ("PaCO2", 80, "mm[Hg]"), ("PaCO2target", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("VE", 8, "L/min"), ("PaCO2", 60, "mm[Hg]"), ("target", 45, "mm[Hg]")];

    /// <summary>What is in force, measured tension and target in one unit.</summary>
    public static double Of(double now, double paco2, double target) => now * paco2 / target;
}
