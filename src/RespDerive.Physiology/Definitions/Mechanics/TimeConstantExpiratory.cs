using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Time in which the passive lung empties to 37 % of what is left.</summary>
/// <remarks>
/// tau = R·C / 1000, C in mL/cm[H2O]. The resistance is the inspiratory one; the expiratory is higher, so the true time is longer.
/// </remarks>
public sealed class TimeConstantExpiratory : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("time-constant-expiratory", "tau", "expiratory time constant", "s", 0.05, 5,
        Tolerance.Deviation(0, 0.3, "typical"), [new Slot(AirwayResistance.Value, new Pairing.AnchorItself()), new Slot(StaticCompliance.Value, new Pairing.AnchorItself())],
        x => Of(x[AirwayResistance.Value], x[StaticCompliance.Value]));

    /// <summary>R and C as they are called here.</summary>
    internal static IReadOnlyDictionary<string, Kind> ResistanceAndCompliance { get; } =
        new Dictionary<string, Kind> { ["R"] = AirwayResistance.Value, ["C"] = StaticCompliance.Value };

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Airway resistance times static compliance.";

    /// <inheritdoc/>
    public override string Equation => "tau = R·C / 1000";

    /// <inheritdoc/>
    public override string Assumptions => "Passive emptying of one compartment; resistance and compliance of the same breath. From the record the resistance is inspiratory.";

    /// <inheritdoc/>
    public override string Caution => "Rests on the inspiratory resistance; the expiratory one is higher, so the lung empties more slowly than this says. Not an alarm for air trapping.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.3, 0.8);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => ResistanceAndCompliance;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 30, "cm[H2O]", null, "a"), new("Pplat", 24, "cm[H2O]", null, "b"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]")] },
        VentilatorGates.FlowConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("Ppeak", 20, "cm[H2O]"), ("Pplat", 24, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Ppeak", 30, "cm[H2O]"), ("Pplat", 10, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 420, "mL"), ("PEEPtot", 10, "cm[H2O]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => AirwayResistance.Breath;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 12 cm[H2O].s/L · 0.05 L/cm[H2O]", 0.6, 1e-9, ("R", 12, "cm[H2O].s/L"), ("C", 50, "mL/cm[H2O]")),
        new(Evidence.Limit, "from the parts: (35 − 25) / (1 L/s) · 450 mL / (25 − 10) = 10 · 0.030", 0.3, 1e-9, ("Ppeak", 35, "cm[H2O]"), ("Pplat", 25, "cm[H2O]"), ("flow", 60, "L/min"), ("VT", 450, "mL"), ("PEEPtot", 10, "cm[H2O]")),
    ];

    private static Given[] Example => [("R", 12, "cm[H2O].s/L"), ("C", 50, "mL/cm[H2O]")];

    /// <summary>Resistance in cm[H2O].s/L, compliance in mL/cm[H2O].</summary>
    public static double Of(double resistance, double compliance) => resistance * compliance / 1000;
}
