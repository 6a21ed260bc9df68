using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Time for 95 % of a passive breath to leave the lung.</summary>
/// <remarks>
/// T95 = 3·tau: 1 − e^−3 is 0.950. A shorter expiratory time leaves air behind.
/// </remarks>
public sealed class ExpiratoryTime95 : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("expiratory-time-95", "T95", "time to 95 % passive emptying", "s", 0.15, 15,
        Tolerance.Deviation(0, 0.3, "typical"), [new Slot(TimeConstantExpiratory.Value, new Pairing.AnchorItself())], x => Of(x[TimeConstantExpiratory.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Three expiratory time constants: the time for 95 % of a passive breath to leave.";

    /// <inheritdoc/>
    public override string Equation => "T95 = 3·tau";

    /// <inheritdoc/>
    public override string Assumptions => "As for the expiratory time constant; one compartment, exponential emptying.";

    /// <inheritdoc/>
    public override string Caution => "Rests on the inspiratory resistance, so the true time is longer. Not an alarm for air trapping.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.9, 2.4);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => TimeConstantExpiratory.ResistanceAndCompliance;

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
        new(Evidence.Limit, "exact on paper: 3 · 0.6; 1 − e^−3 = 0.950", 1.8, 1e-9, ("tau", 0.6, "s")),
        new(Evidence.Limit, "e^−t/tau = 0.05 at t = tau·ln 20 = 0.6 · 2.9957", 1.8, 0.003, ("R", 12, "cm[H2O].s/L"), ("C", 50, "mL/cm[H2O]")),
    ];

    private static Given[] Example => [("R", 12, "cm[H2O].s/L"), ("C", 50, "mL/cm[H2O]")];

    /// <summary>Time constant in s.</summary>
    public static double Of(double constant) => 3 * constant;
}
