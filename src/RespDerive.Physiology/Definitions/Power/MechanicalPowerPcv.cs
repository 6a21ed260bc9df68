using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Energy a minute that the ventilator puts into the respiratory system in pressure control, with the rise of the pressure.</summary>
/// <remarks>
/// MP = k·RR·((PEEP + dPinsp)·VT − dPinsp²·C·(½ − x + x²·(1 − e^(−1/x)))), x = R·C/Tslope: the rectangle less what the ramp leaves out.
/// By hand only: in pressure control the record holds neither the resistance nor, as a rule, the rise time.
/// </remarks>
public sealed class MechanicalPowerPcv : Definition
{
    private static readonly Slot Rise = new(Kinds.RiseTime, new Pairing.ByHand());

    private static readonly Slot PressureControl = Slots.ModeKnown(Withheld.WrongMode);

    private static readonly Slot Resistance = new(AirwayResistance.Value, new Pairing.ByHand());

    private static readonly Slot Compliance = new(StaticCompliance.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("mechanical-power-pcv", "MPpcv", "mechanical power in pressure control", "J/min", 0.2, 120, Tolerance.Deviation(0, 0.1, "error against the measured power, Trinkle 2022"),
        [
            Slots.TidalVolumeAnchor, MechanicalPowerPcvSimplified.AbovePeep, MechanicalPowerPcvSimplified.HeldPeep, Slots.Rate,
            Resistance, Compliance, Rise, Slots.PrintedWorkFactor, PressureControl,
        ],
        x => Of(x[Slots.Rate], x[Slots.TidalVolumeAnchor], x[MechanicalPowerPcvSimplified.AbovePeep], x[MechanicalPowerPcvSimplified.HeldPeep],
            x[Resistance], x[Compliance], x[Rise], x[Slots.PrintedWorkFactor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Mechanical power in pressure control with a linear rise of the inspiratory pressure.";

    /// <inheritdoc/>
    public override string Equation => "MPpcv = k·RR·((PEEP + dPinsp)·VT/1000 − dPinsp²·C/1000·(1/2 − x + x²·(1 − e^(−1/x)))), x = R·C/(1000·Tslope)";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, pressure control, pressure rising in a straight line over Tslope and held until the volume is in; one "
        + "compartment. k = 0.098 as printed by the source (exact: 0.0980665). Computed on request only: resistance and rise time "
        + "are not in the record of a pressure-controlled breath.";

    /// <inheritdoc/>
    public override string Caution =>
        "No agreed threshold: for trend only. Whether the PEEP term belongs in it is disputed. Power of the ventilator on lung "
        + "and chest wall together; with patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => TimeConstantExpiratory.ResistanceAndCompliance;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.PressureControlled with { TrippedBy = [.. Example, ("mode", "volume control")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => AirwayResistance.Breath;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Becher T et al. Calculation of mechanical power for pressure-controlled ventilation. Intensive Care Med 2019;45:1321 (from memory; algebra re-derived)"),
        new("Trinkle CA et al. Simple, accurate calculation of mechanical power in pressure controlled ventilation. Intensive Care Med Exp 2022;10:22 (errors of both forms)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "equals the integral of pressure over volume of a simulated breath (step 1e-6 s, inspiratory time 2.5 s)", 21.0657, 0.001, ("RR", 20, "/min"), ("VT", 0.44986, "L"), ("dPinsp", 15, "cm[H2O]"), ("PEEP", 10, "cm[H2O]"), ("R", 10, "cm[H2O].s/L"), ("C", 0.03, "L/cm[H2O]"), ("Tslope", 0.15, "s")),
        new(Evidence.Limit, "no rise time leaves the rectangle of the simplified form: 0.098·20·0.4·25", 19.6, 1e-9, ("RR", 20, "/min"), ("VT", 0.4, "L"), ("dPinsp", 15, "cm[H2O]"), ("PEEP", 10, "cm[H2O]"), ("R", 10, "cm[H2O].s/L"), ("C", 0.03, "L/cm[H2O]"), ("Tslope", 0, "s")),
    ];

    private static Given[] Example => [("RR", 20, "/min"), ("VT", 0.4, "L"), ("dPinsp", 15, "cm[H2O]"), ("PEEP", 10, "cm[H2O]"), ("R", 10, "cm[H2O].s/L"), ("C", 0.03, "L/cm[H2O]"), ("Tslope", 0.15, "s")];

    /// <summary>Rate per minute, volume in mL, pressures in cm[H2O], resistance in cm[H2O].s/L, compliance in mL/cm[H2O], rise in s, k in J/(L.cm[H2O]).</summary>
    public static double Of(double rate, double volume, double above, double peep, double resistance, double compliance, double rise, double factor)
    {
        var ramp = 0.0;
        if (rise > 0)
        {
            var x = resistance * compliance / (1000 * rise);
            ramp = 0.5 - x + (x * x * (1 - Math.Exp(-1 / x)));
        }

        return factor * rate * (((peep + above) * volume / 1000) - (above * above * compliance / 1000 * ramp));
    }
}
