using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Driving pressure and breath rate in one sum.</summary>
/// <remarks>
/// 4DPRR = 4·dP + RR: the weights with which both stood in a regression of mortality. A bare number, cm[H2O] and /min added.
/// </remarks>
public sealed class FourDpRr : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("four-dprr", "4DPRR", "four times driving pressure plus breath rate", "1", 10, 250,
        Tolerance.Deviation(9, 0, "typical"), [new Slot(DrivingPressure.Value, new Pairing.AnchorItself()), Slots.Rate], x => Of(x[DrivingPressure.Value], x[Slots.Rate]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Four times the driving pressure plus the total breath rate.";

    /// <inheritdoc/>
    public override string Equation => "4DPRR = 4·dP + RR";

    /// <inheritdoc/>
    public override string Assumptions => "As for driving pressure; total, not set, breath rate; derived in adults with acute respiratory distress syndrome on controlled ventilation.";

    /// <inheritdoc/>
    public override string Caution => "No agreed threshold: for trend only. With set PEEP and unseen intrinsic PEEP it reads falsely high; with patient effort falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (50, 110);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.PlateauMeasured with { TrippedBy = [("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("RR", 20, "/min")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"), ("RR", 20, "/min")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Costa ELV et al. Ventilatory variables and mechanical power in patients with acute respiratory distress syndrome. Am J Respir Crit Care Med 2021;204:303 (coefficients as reproduced in a public analysis)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 4·15 + 20", 80, 1e-9, ("dP", 15, "cm[H2O]"), ("RR", 20, "/min")),
        new(Evidence.Limit, "from the parts: 4·(26 − 12) + 24", 80, 1e-9, ("Pplat", 26, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"), ("RR", 24, "/min")),
    ];

    private static Given[] Example => [("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("RR", 20, "/min")];

    /// <summary>Driving pressure in cm[H2O], rate per minute.</summary>
    public static double Of(double drivingPressure, double rate) => (4 * drivingPressure) + rate;
}
