using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Elastic and resistive work a minute, without that of PEEP.</summary>
/// <remarks>
/// Wrate = RR·(Wel + Wres). The flow is constant when one is given, else half a sine wave.
/// By hand, without volume and rate, at the rate of least work for a given alveolar ventilation and dead space.
/// </remarks>
public sealed class WorkRateTotal : Definition
{
    private const string LeastWork = "at-rate-of-least-work";

    private static readonly Slot Volume = new("tidal volume",
        [.. Slots.TidalVolume.Options, new Option(MinimumWorkVt.Value, new Pairing.ByHand(), null, LeastWork)]);

    private static readonly Slot Rate = new("breath rate", [.. Slots.Rate.Options, new Option(MinimumWorkRate.Value, new Pairing.ByHand(), null, LeastWork)]);

    private static readonly Slot Pattern = new("inspiratory flow",
        [
            new Option(Kinds.FlowSet, new Pairing.InForce(), null, "constant-flow"),
            new Option(Kinds.RateTotal, new Pairing.ByHand(), null, "half-sine-flow"),
            new Option(MinimumWorkRate.Value, new Pairing.ByHand(), null, LeastWork),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("work-rate-total", "Wrate", "elastic and resistive work per minute", "J/min", 0, 150, Tolerance.Deviation(0, 0.2, "typical"),
        [Volume, Pattern, Rate, new Slot(Elastance.Value, new Pairing.AnchorItself()), new Slot(AirwayResistance.Value, new Pairing.AnchorItself())], Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Breath rate times the elastic and resistive work of a breath.";

    /// <inheritdoc/>
    public override string Equation => "Wrate = RR·(Wel + Wres)";

    /// <inheritdoc/>
    public override string Assumptions =>
        "As for the elastic and the resistive work per breath; inspiration only, PEEP left out. Without volume and rate: those of "
        + "the least work (half-sine flow).";

    /// <inheritdoc/>
    public override string Caution =>
        "Work of the ventilator on the patient, not of the patient: the work of breathing needs an esophageal pressure. With "
        + "patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (1, 20);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => Names;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.FlowConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 30, "cm[H2O]", null, "a"), new("Pplat", 24, "cm[H2O]", null, "b"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]"), ("RR", 20, "/min")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("Ppeak", 20, "cm[H2O]"), ("Pplat", 24, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]"), ("RR", 20, "/min")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Ppeak", 30, "cm[H2O]"), ("Pplat", 10, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]"), ("RR", 20, "/min")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => AirwayResistance.Breath;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Otis AB, Fenn WO, Rahn H. Mechanics of breathing in man. J Appl Physiol 1950;2:592 (criterion; closed form derived from it)"),
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "rate times the two areas: 20·(½·10·0.25 + 10·0.5·0.5) L·cm[H2O] = 75·98.0665 mJ", 7.3549875, 1e-9, ("E", 10, "cm[H2O]/L"), ("R", 10, "cm[H2O].s/L"), ("VT", 0.5, "L"), ("RR", 20, "/min"), ("flow", 0.5, "L/s")),
        new(Evidence.Limit, "simplified mechanical power less its PEEP term: 0.0980665·20·0.5·(25 − 7.5 − 5)", 12.2583125, 1e-9, ("VT", 0.5, "L"), ("RR", 20, "/min"), ("flow", 0.5, "L/s"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")),
        new(Evidence.Limit, "least of all rates that keep 4.5 L/min alveolar with 0.15 L dead space, found by search", 2.03435, 0.0002, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 0.1, "L/cm[H2O]"), ("R", 3, "cm[H2O].s/L")),
    ];

    private static Given[] Example => [("E", 10, "cm[H2O]/L"), ("R", 10, "cm[H2O].s/L"), ("VT", 500, "mL"), ("RR", 20, "/min"), ("flow", 30, "L/min")];

    private static Dictionary<string, Kind> Names { get; } =
        new(WorkElasticPerBreath.MechanicsSymbols.Concat(MinimumWorkRate.ModelSymbols).DistinctBy(entry => entry.Key));

    private static double Compute(Roots x)
    {
        var (volume, rate, resistance) = (x[Volume], x[Rate], x[AirwayResistance.Value]);
        var resistive = x.Has(Kinds.FlowSet)
            ? WorkResistivePerBreath.AtConstantFlow(resistance, volume, x[Kinds.FlowSet])
            : WorkResistivePerBreath.AtHalfSine(resistance, volume, rate);
        return rate * (WorkElasticPerBreath.Of(x[Elastance.Value], volume) + resistive);
    }
}
