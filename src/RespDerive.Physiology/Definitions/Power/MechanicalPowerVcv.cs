using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Energy a minute that the ventilator puts into the respiratory system in volume control, from elastance and resistance.</summary>
/// <remarks>
/// MP = k·RR·(VT²·(½·Ers + RR·(1 + IE)/(60·IE)·Raw) + VT·PEEPtot), VT in L, IE inspiratory over expiratory time (1:2 is 0.5).
/// The three addends are the elastic, the resistive and the PEEP term. By hand also from the pressures, which is the same at constant flow.
/// </remarks>
public sealed class MechanicalPowerVcv : Definition
{
    private static readonly TimeSpan FiveMinutes = TimeSpan.FromMinutes(5);

    private static readonly Slot Ratio = new("inspiratory over expiratory time",
        [new Option(Kinds.IeRatio, new Pairing.Nearest(FiveMinutes, FiveMinutes)), new Option(Kinds.IeRatioSet, new Pairing.InForce())]);

    private static readonly Slot VolumeControl = Slots.ModeKnown(Withheld.WrongMode);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("mechanical-power-vcv", "MPvcv", "mechanical power in volume control", "J/min", 0.2, 120, Tolerance.Deviation(0, 0.13, "typical"),
        [
            Slots.TidalVolume, new Slot(Elastance.Value, new Pairing.AnchorItself()), new Slot(AirwayResistance.Value, new Pairing.AnchorItself()),
            Slots.Peep, Slots.Rate, Ratio, Slots.PrintedWorkFactor, VolumeControl,
        ],
        Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Mechanical power in volume control from elastance, resistance, PEEP, volume and times.";

    /// <inheritdoc/>
    public override string Equation => "MPvcv = k·RR·((VT/1000)²·(Ers/2 + RR·(1 + IE)/(60·IE)·Raw) + VT/1000·PEEPtot)";

    /// <inheritdoc/>
    public override string Assumptions =>
        "Passive patient, volume control; gas flows at a constant rate during the whole inspiratory time. Where a pause is part "
        + "of that time the resistive term reads too low; the simplified form does not. k = 0.098 as printed by the source (exact: "
        + "0.0980665). By hand volume control is assumed unless the mode is given.";

    /// <inheritdoc/>
    public override string Caution =>
        "No agreed threshold: for trend only. Whether the PEEP term belongs in it is disputed. Power of the ventilator on lung "
        + "and chest wall together; with patient effort it reads falsely low. IE is inspiratory over expiratory time: 1:2 is 0.5, "
        + "not 2.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Slot> ByIdentity => MechanicalPowerVcvSimplified.Inputs;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        VentilatorGates.PressuresOfOneDevice with { TrippedBy = [new("Ppeak", 25, "cm[H2O]", null, "a"), new("Pplat", 20, "cm[H2O]", null, "b"), ("RR", 20, "/min"), ("VT", 500, "mL"), ("PEEPtot", 5, "cm[H2O]")] },
        VentilatorGates.WaveformConstant with { TrippedBy = [.. Example, ("waveform", "decelerating")] },
        VentilatorGates.VolumeControlled with { TrippedBy = [.. Example, ("mode", "pressure control")] },
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("RR", 20, "/min"), ("VT", 500, "mL"), ("Pplat", 12, "cm[H2O]"), ("IE", 0.5, "1"), ("Raw", 10, "cm[H2O].s/L"), ("PEEPtot", 12, "cm[H2O]")] },
        VentilatorGates.PeakNotBelowPlateau with { TrippedBy = [("RR", 20, "/min"), ("VT", 500, "mL"), ("Ppeak", 18, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Kind> OneTransducer => AirwayResistance.Breath;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Gattinoni L et al. Ventilator-related causes of lung injury: the mechanical power. Intensive Care Med 2016;42:1567, power equation", "10.1007/s00134-016-4505-2"),
        new("Wu Z et al. 2022, on whether PEEP belongs in the mechanical power (title from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "identity with the simplified form at constant flow: 0.098·20·(0.25·(15 + 20·1.5/30·10) + 2.5)", 17.15, 1e-9, ("RR", 20, "/min"), ("VT", 0.5, "L"), ("Ers", 30, "cm[H2O]/L"), ("IE", 0.5, "1"), ("Raw", 10, "cm[H2O].s/L"), ("PEEPtot", 5, "cm[H2O]")),
        new(Evidence.Limit, "the same breath by its pressures: 0.098·20·0.5·(25 − 7.5)", 17.15, 1e-9, ("RR", 20, "/min"), ("VT", 0.5, "L"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")),
    ];

    private static Given[] Example => [("RR", 20, "/min"), ("VT", 500, "mL"), ("Ers", 30, "cm[H2O]/L"), ("IE", 0.5, "1"), ("Raw", 10, "cm[H2O].s/L"), ("PEEPtot", 5, "cm[H2O]")];

    /// <summary>Rate per minute, volume in mL, elastance in cm[H2O]/L, IE as a number, resistance in cm[H2O].s/L, PEEP in cm[H2O], k in J/(L.cm[H2O]).</summary>
    public static double Of(double rate, double volume, double elastance, double ratio, double resistance, double peep, double factor)
    {
        var litres = volume / 1000;
        var elastic = litres * litres * elastance / 2;
        var resistive = litres * litres * rate * (1 + ratio) / (60 * ratio) * resistance;
        return factor * rate * (elastic + resistive + (litres * peep));
    }

    private static double Compute(Roots x) => Value.ComputableFrom(x)
        ? Of(x[Slots.Rate], x[Slots.TidalVolume], x[Elastance.Value], x[Ratio], x[AirwayResistance.Value], x[Slots.Peep], x[Slots.PrintedWorkFactor])
        : MechanicalPowerVcvSimplified.Compute(x);
}
