using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Energy a minute that the ventilator puts into the respiratory system in volume control, from pressures alone.</summary>
/// <remarks>
/// MP = k·RR·VT·(Ppeak − ½·(Pplat − PEEPtot)), VT in L. At constant flow this is the full form exactly; it asks for less and does not lean on
/// the charted ratio of times, so it is the one that runs by default. k is 0.098 as printed; a litre times a cm[H2O] is 0.0980665 J.
/// </remarks>
public sealed class MechanicalPowerVcvSimplified : Definition
{
    private static readonly Slot VolumeControl = Slots.ModeKnown(Withheld.WrongMode);

    /// <summary>What it is computed from, also by identity for the full form.</summary>
    internal static IReadOnlyList<Slot> Inputs { get; } = [Slots.Plateau, Slots.Peak, Slots.TidalVolume, Slots.Peep, Slots.Rate, Slots.PrintedWorkFactor, VolumeControl];

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("mechanical-power-vcv-simplified", "MPvcvs", "mechanical power in volume control, simplified form", "J/min", 0.2, 120,
        Tolerance.Deviation(0, 0.13, "typical"), Inputs, Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Mechanical power in volume control from peak, plateau and end-expiratory pressure.";

    /// <inheritdoc/>
    public override string Equation => "MPvcvs = k·RR·VT/1000·(Ppeak − (Pplat − PEEPtot)/2)";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, volume control with constant flow; pressures and volume of one breath. The PEEP term is included. k = "
        + "0.098 as printed by the source (exact: 0.0980665 J/(L.cm[H2O]), 0.07 % more). By hand volume control is assumed unless "
        + "the mode is given.";

    /// <inheritdoc/>
    public override string Caution =>
        "No agreed threshold: for trend only. Whether the PEEP term belongs in it is disputed. Power of the ventilator on lung "
        + "and chest wall together; with patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 25, "cm[H2O]", null, "a"), new("Pplat", 20, "cm[H2O]", null, "b"), ("RR", 20, "/min"), ("VT", 500, "mL"), ("PEEPtot", 5, "cm[H2O]")] },
        VentilatorGates.WaveformConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        VentilatorGates.VolumeControlled with { TrippedBy = [.. Example, ("mode", "pressure control")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("RR", 20, "/min"), ("VT", 500, "mL"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("RR", 20, "/min"), ("VT", 500, "mL"), ("Ppeak", 18, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Gattinoni L et al. Ventilator-related causes of lung injury: the mechanical power. Intensive Care Med 2016;42:1567, power equation", "10.1007/s00134-016-4505-2"),
        new("Wu Z et al. 2022, on whether PEEP belongs in the mechanical power (title from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "identity with the full form at constant flow: PEEP 5, elastance 30, 0.5 L in 1 s against 10 cm[H2O].s/L gives Pplat 20 and Ppeak 25; 0.098·20·0.5·(25 − 7.5)", 17.15, 1e-9, ("RR", 20, "/min"), ("VT", 0.5, "L"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")),
        new(Evidence.Limit, "the exact litre times cm[H2O], 0.0980665 J, in place of the printed 0.098: 175 · 0.0980665", 17.1616375, 1e-9, ("RR", 20, "/min"), ("VT", 0.5, "L"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]"), ("k", 0.0980665, "J/(L.cm[H2O])")),
    ];

    private static Given[] Example => [("RR", 20, "/min"), ("VT", 500, "mL"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")];

    /// <summary>Rate per minute, volume in mL, pressures in cm[H2O], k in J/(L.cm[H2O]).</summary>
    public static double Of(double rate, double volume, double peak, double plateau, double peep, double factor) =>
        factor * rate * volume / 1000 * (peak - ((plateau - peep) / 2));

    internal static double Compute(Roots x) =>
        Of(x[Slots.Rate], x[Slots.TidalVolume], x[Slots.Peak], x[Slots.Plateau], x[Slots.Peep], x[Slots.PrintedWorkFactor]);
}
