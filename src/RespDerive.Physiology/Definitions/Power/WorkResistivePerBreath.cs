using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Work a breath that drives gas through the airways.</summary>
/// <remarks>
/// Wres = R·flow·VT·0.0980665 at constant flow; (π²/4)·R·f·VT²·0.0980665 for half a sine wave with equal times, f in /s. VT in L, flow in L/s.
/// The result names which of the two it is.
/// </remarks>
public sealed class WorkResistivePerBreath : Definition
{
    private static readonly Slot Flow = new("inspiratory flow",
        [new Option(Kinds.FlowSet, new Pairing.InForce(), null, "constant-flow"), new Option(Kinds.RateTotal, new Pairing.ByHand(), null, "half-sine-flow")]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("work-resistive-per-breath", "Wres", "resistive work per breath", "J", 0, 10,
        Tolerance.Deviation(0, 0.25, "typical"), [Flow, new Slot(AirwayResistance.Value, new Pairing.AnchorItself()), Slots.TidalVolume],
        x => x.Has(Kinds.FlowSet) ? AtConstantFlow(x[AirwayResistance.Value], x[Slots.TidalVolume], x[Kinds.FlowSet])
            : AtHalfSine(x[AirwayResistance.Value], x[Slots.TidalVolume], x[Kinds.RateTotal]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Resistance times flow times tidal volume; from the rate alone for half a sine wave.";

    /// <inheritdoc/>
    public override string Equation => "Wres = 0.0980665·R·flow/60·VT/1000, or without a flow 0.0980665·(π²/4)·R·RR/60·(VT/1000)²";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, resistance independent of flow, inspiration only. Constant flow when a flow is given; otherwise half a "
        + "sine wave with inspiration as long as expiration (by hand only). Litre times cm[H2O] is 0.0980665 J exactly.";

    /// <inheritdoc/>
    public override string Caution =>
        "Work of the ventilator on the patient, not of the patient: the work of breathing needs an esophageal pressure. With "
        + "patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 3;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.05, 1);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => WorkElasticPerBreath.MechanicsSymbols;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.FlowConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 30, "cm[H2O]", null, "a"), new("Pplat", 24, "cm[H2O]", null, "b"), ("flow", 60, "L/min"), ("VT", 420, "mL")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("Ppeak", 20, "cm[H2O]"), ("Pplat", 24, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 420, "mL")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => AirwayResistance.Breath;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Otis AB, Fenn WO, Rahn H. Mechanics of breathing in man. J Appl Physiol 1950;2:592 (from memory)"),
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "a constant drop of 5 cm[H2O] over half a litre: 2.5·98.0665 mJ", 0.24516625, 1e-9, ("R", 10, "cm[H2O].s/L"), ("flow", 0.5, "L/s"), ("VT", 0.5, "L")),
        new(Evidence.Limit, "mean of the squared half sine: (π²/8)·R·VT²/Ti, Ti = 2 s, so (π²/8)·3·0.125 L·cm[H2O]", 0.0453693, 5e-07, ("R", 3, "cm[H2O].s/L"), ("RR", 15, "/min"), ("VT", 0.5, "L")),
    ];

    private static Given[] Example => [("R", 10, "cm[H2O].s/L"), ("flow", 30, "L/min"), ("VT", 500, "mL")];

    /// <summary>Resistance in cm[H2O].s/L, volume in mL, flow in L/min.</summary>
    public static double AtConstantFlow(double resistance, double volume, double flow) => WorkElasticPerBreath.JoulePerLitre * resistance * flow / 60 * volume / 1000;

    /// <summary>Resistance in cm[H2O].s/L, volume in mL, rate per minute; inspiration as long as expiration.</summary>
    public static double AtHalfSine(double resistance, double volume, double rate) =>
        WorkElasticPerBreath.JoulePerLitre * Math.PI * Math.PI / 4 * resistance * rate / 60 * volume * volume / 1e6;
}
