using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Mechanical power in volume control without a hold.</summary>
/// <remarks>
/// MP ≈ VE·(Ppeak + PEEP + flow/6) / 20, flow in L/min: as if airway resistance were 10 cm[H2O].s/L. For when there is no plateau pressure.
/// </remarks>
public sealed class MechanicalPowerVcvSurrogate : Definition
{
    private static readonly TimeSpan TwoMinutes = TimeSpan.FromMinutes(2);

    private static readonly Slot Anchor = new(Kinds.Peak, new Pairing.AnchorItself());

    private static readonly Slot Flow = new(Kinds.FlowSet, new Pairing.InForce());

    private static readonly Slot VolumeControl = Slots.ModeKnown(Withheld.WrongMode);

    private static readonly Slot Ventilation = new("minute ventilation",
        [
            new Option(Kinds.MinuteVolumeExpired, new Pairing.Nearest(TwoMinutes, TwoMinutes)),
            new Option(MinuteVentilation.Value, new Pairing.Nearest(TwoMinutes, TwoMinutes)),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("mechanical-power-vcv-surrogate", "MPvcvq", "mechanical power in volume control, surrogate without plateau", "J/min", 0.2, 120,
        Tolerance.Deviation(0, 0.15, "typical"), [Anchor, Ventilation, Slots.Peep, Flow, VolumeControl],
        x => Of(x[Ventilation], x[Anchor], x[Slots.Peep], x[Flow]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Mechanical power in volume control estimated without a plateau pressure.";

    /// <inheritdoc/>
    public override string Equation => "MPvcvq = VE·(Ppeak + PEEPtot + flow/6) / 20";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, volume control with constant flow; airway resistance near 10 cm[H2O].s/L. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "An estimate: wrong where resistance is not near 10 cm[H2O].s/L. No agreed threshold: for trend only. With patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Peak], Cadence.QuarterHour) { OnlyWith = [Kinds.FlowSet] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.WaveformConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        VentilatorGates.VolumeControlled with { TrippedBy = [.. Example, ("mode", "pressure control")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Giosa L et al. Mechanical power at a glance: a simple surrogate for volume-controlled ventilation. Intensive Care Med Exp 2019;7:61, equation", "10.1186/s40635-019-0276-8"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 10·(25 + 5 + 30/6) / 20", 17.5, 1e-9, ("VE", 10, "L/min"), ("Ppeak", 25, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]"), ("flow", 30, "L/min")),
        new(Evidence.Limit, "near the full form (17.15) of the breath it was made for: resistance 10 cm[H2O].s/L; volume times rate for minute ventilation", 17.15, 0.4, ("VT", 0.5, "L"), ("RR", 20, "/min"), ("Ppeak", 25, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]"), ("flow", 0.5, "L/s")),
    ];

    private static Given[] Example => [("VE", 10, "L/min"), ("Ppeak", 25, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]"), ("flow", 30, "L/min")];

    /// <summary>Ventilation in L/min, pressures in cm[H2O], flow in L/min.</summary>
    public static double Of(double ventilation, double peak, double peep, double flow) => ventilation * (peak + peep + (flow / 6)) / 20;
}
