using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Breath rate that would bring PaCO2 to a target at the same tidal volume.</summary>
/// <remarks>RR·PaCO2/target. Above 35 /min it is withheld, the ceiling of the ARDS Network protocol. Only by hand, never published.</remarks>
public sealed class RespiratoryRateForTarget : Definition
{
    private static readonly Slot Rate = new(Kinds.RateTotal, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("respiratory-rate-for-target-paco2", "RRtarget", "breath rate for a target PaCO2", "/min", 2, 35,
        Tolerance.Deviation(0, 0.11, "typical"), [Rate, CarbonDioxideSlots.PaCO2, CarbonDioxideSlots.Target],
        x => MinuteVentilationForTarget.Of(x[Rate], x[CarbonDioxideSlots.PaCO2], x[CarbonDioxideSlots.Target]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Targets";

    /// <inheritdoc/>
    public override string Summary => "Breath rate at which PaCO2 would reach a target, by proportion at fixed tidal volume.";

    /// <inheritdoc/>
    public override string Equation => "RRtarget = RR·PaCO2/PaCO2target";

    /// <inheritdoc/>
    public override string Assumptions => "Tidal volume, dead space and carbon dioxide production unchanged; steady state, reached 20 to 30 min after a change. Up to 35 /min (ARDS Network ceiling).";

    /// <inheritdoc/>
    public override string Caution => "Arithmetic on charted values, never an order: local policy and licensed clinicians decide. A faster rate shortens expiration: mind air trapping and raised intracranial pressure.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (8, 30);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        new Gate(Withheld.RateAboveCeiling, "the rate would be above 35 /min", [],
            x => x.Has(Rate) && x.Has(CarbonDioxideSlots.PaCO2) && x.Has(CarbonDioxideSlots.Target) && Value.Formula!(x) > 35,
            ("RR", 30, "/min"), ("PaCO2", 60, "mm[Hg]"), ("target", 40, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["target"] = Kinds.PaCO2Target };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Consequence of the alveolar ventilation equation; common practice, no single source"),
        new("ARDS Network. Ventilation with lower tidal volumes. N Engl J Med 2000;342:1301 (rate up to 35 /min)", "10.1056/NEJM200005043421801"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "the target already met: nothing changes", 16, 1e-9,
            ("RR", 16, "/min"), ("PaCO2", 50, "mm[Hg]"), ("PaCO2target", 50, "mm[Hg]")),
        new(Evidence.Limit, "half the tension takes twice the rate", 30, 1e-9,
            ("RR", 15, "/min"), ("PaCO2", 80, "mm[Hg]"), ("PaCO2target", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("RR", 16, "/min"), ("PaCO2", 60, "mm[Hg]"), ("target", 45, "mm[Hg]")];
}
