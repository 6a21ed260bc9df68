using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Energy a minute that the ventilator puts into the respiratory system in pressure control, taking the pressure as a rectangle.</summary>
/// <remarks>
/// MP = k·RR·VT·(dPinsp + PEEP), VT in L, dPinsp the set pressure above PEEP, PEEP the one it stands on (set, not total). Too high when the pressure rises slowly.
/// </remarks>
public sealed class MechanicalPowerPcvSimplified : Definition
{
    private static readonly TimeSpan FiveMinutes = TimeSpan.FromMinutes(5);

    private static readonly Slot PressureControl = Slots.ModeKnown(Withheld.WrongMode);

    /// <summary>Set inspiratory pressure above PEEP.</summary>
    internal static readonly Slot AbovePeep = new(Kinds.InspiratoryPressureAbovePeep, new Pairing.InForce());

    /// <summary>The PEEP that the ventilator holds.</summary>
    internal static readonly Slot HeldPeep = new("PEEP",
        [new Option(Kinds.PeepSet, new Pairing.InForce()), new Option(Kinds.Peep, new Pairing.Nearest(FiveMinutes, FiveMinutes))]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("mechanical-power-pcv-simplified", "MPpcvs", "mechanical power in pressure control, simplified form", "J/min", 0.2, 120,
        Tolerance.Deviation(0, 0.19, "error against the measured power, Trinkle 2022"), [Slots.TidalVolumeAnchor, AbovePeep, HeldPeep, Slots.Rate, Slots.PrintedWorkFactor, PressureControl],
        x => Of(x[Slots.Rate], x[Slots.TidalVolumeAnchor], x[AbovePeep], x[HeldPeep], x[Slots.PrintedWorkFactor]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Mechanical power in pressure control from set pressure, PEEP, volume and rate.";

    /// <inheritdoc/>
    public override string Equation => "MPpcvs = k·RR·VT/1000·(dPinsp + PEEP)";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, pressure control; pressure rises at once. With a slow rise it reads too high (19 % on average on "
        + "patients, Trinkle 2022). k = 0.098 as printed by the source (exact: 0.0980665). By hand pressure control is assumed "
        + "unless the mode is given.";

    /// <inheritdoc/>
    public override string Caution =>
        "No agreed threshold: for trend only. Whether the PEEP term belongs in it is disputed. Power of the ventilator on lung "
        + "and chest wall together; with patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.TidalVolumeExpired, Kinds.TidalVolume], Cadence.QuarterHour) { OnlyWith = [Kinds.InspiratoryPressureAbovePeep] };

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
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Becher T et al. Calculation of mechanical power for pressure-controlled ventilation. Intensive Care Med 2019;45:1321 (from memory; algebra re-derived)"),
        new("Trinkle CA et al. Simple, accurate calculation of mechanical power in pressure controlled ventilation. Intensive Care Med Exp 2022;10:22 (errors of both forms)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 0.098·20·0.4·(15 + 10)", 19.6, 1e-9, ("RR", 20, "/min"), ("VT", 0.4, "L"), ("dPinsp", 15, "cm[H2O]"), ("PEEP", 10, "cm[H2O]")),
    ];

    private static Given[] Example => [("RR", 20, "/min"), ("VT", 0.4, "L"), ("dPinsp", 15, "cm[H2O]"), ("PEEP", 10, "cm[H2O]")];

    /// <summary>Rate per minute, volume in mL, pressures in cm[H2O], k in J/(L.cm[H2O]).</summary>
    public static double Of(double rate, double volume, double above, double peep, double factor) => factor * rate * volume / 1000 * (above + peep);
}
