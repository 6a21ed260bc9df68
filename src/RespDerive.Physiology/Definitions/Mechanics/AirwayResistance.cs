using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Resistance of airways and tube to constant inspiratory flow.</summary>
/// <remarks>
/// Raw = 60·(Ppeak − Pplat) / flow, flow in L/min. Peak and plateau of one breath come from one transducer, so its zero offset cancels.
/// The maximal resistance: it holds the viscoelastic part of lung and chest wall, and the tube.
/// </remarks>
public sealed class AirwayResistance : Definition
{
    /// <summary>Constant flow is proven only by a set flow in force in a mode that controls volume.</summary>
    private static readonly Slot Flow = new(Kinds.FlowSet, new Pairing.InForce(), Withheld.FlowNotConstant);

    private static readonly Slot VolumeControl = Slots.ModeKnown(Withheld.FlowNotConstant);

    /// <summary>Below this flow the pressure drop is too small against its error (L/min).</summary>
    private const double LeastFlow = 15;

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("airway-resistance", "Raw", "inspiratory airway resistance", "cm[H2O].s/L", 0.5, 150,
        Tolerance.Deviation(0, 0.12, "typical"), [Slots.Plateau, Slots.Peak, Flow, VolumeControl],
        x => Of(x[Slots.Peak], x[Slots.Plateau], x[Flow]));

    /// <summary>Peak and plateau of one breath, for the definitions that rest on a resistance.</summary>
    internal static IReadOnlyList<Kind> Breath { get; } = [Kinds.Peak, Kinds.Plateau];

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Peak minus plateau pressure over the constant inspiratory flow.";

    /// <inheritdoc/>
    public override string Equation => "Raw = 60·(Ppeak − Pplat) / flow";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, constant inspiratory flow until the hold; peak and plateau of one breath. Tube, airways and the "
        + "viscoelastic part together. By hand volume control is assumed unless the mode is given.";

    /// <inheritdoc/>
    public override string Caution => "Contains the tube: a small or clogged tube reads as disease. Not comparable between flows. With patient effort it means nothing.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (5, 20);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.FlowConstant,
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("Ppeak", 20, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 45, "L/min")] },
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 30, "cm[H2O]", null, "a"), new("Pplat", 24, "cm[H2O]", null, "b"), ("flow", 45, "L/min")] },
        new Gate(Withheld.UncertaintyTooLarge, "the set flow is under 15 L/min", [], x => x.Has(Flow) && x[Flow] < LeastFlow, ("Ppeak", 28, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 12, "L/min")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => Breath;

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.30;

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Loinc("75946-4", "Airway resistance"), StandardCode.Mdc("151848", "MDC_RES_AWAY_INSP")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
        new("D'Angelo E et al. Respiratory mechanics in anesthetized paralyzed humans. J Appl Physiol 1989;67:2556 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: (35 − 25) / (1 L/s)", 10, 1e-9, ("Ppeak", 35, "cm[H2O]"), ("Pplat", 25, "cm[H2O]"), ("flow", 60, "L/min")),
        new(Evidence.Limit, "exact on paper: (28 − 22) / (0.75 L/s)", 8, 1e-9, ("Ppeak", 28, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 0.75, "L/s")),
    ];

    private static Given[] Example => [("Ppeak", 28, "cm[H2O]"), ("Pplat", 22, "cm[H2O]"), ("flow", 45, "L/min")];

    /// <summary>Pressures in cm[H2O], flow in L/min.</summary>
    public static double Of(double peak, double plateau, double flow) => 60 * (peak - plateau) / flow;
}
