using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Pressure that distends the respiratory system in a breath.</summary>
/// <remarks>
/// dP = Pplat − PEEPtot; by hand also VT / Cstat, which is the same by definition of the compliance.
/// The zero offset of one transducer is common to both pressures and cancels.
/// </remarks>
public sealed class DrivingPressure : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("driving-pressure", "dP", "driving pressure", "cm[H2O]", 1, 60,
        Tolerance.Deviation(2.2, 0, "typical"), [Slots.Plateau, Slots.Peep], Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Plateau pressure minus total PEEP.";

    /// <inheritdoc/>
    public override string Equation => "dP = Pplat − PEEPtot (= VT / Cstat)";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, flat plateau after a hold of at least 0.5 s, total PEEP.";

    /// <inheritdoc/>
    public override string Caution => "With set PEEP and unseen intrinsic PEEP it reads falsely high; with patient effort falsely low. Confirm hold and passivity.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (6, 18);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Slot> ByIdentity => [Slots.TidalVolume, new Slot(StaticCompliance.Value, new Pairing.ByHand())];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.PlateauMeasured with { TrippedBy = [("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")] },
        CommonGates.Passive with { TrippedBy = [("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("patient_effort", "true")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Mdc("183316", "MDC_VENT_PRESS_AWAY_DIFF_INSP_END_EXP_END_AT_ZERO_FLOW")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Amato MBP et al. Driving pressure and survival in the acute respiratory distress syndrome. N Engl J Med 2015;372:747 (from memory)", "10.1056/NEJMsa1410639"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 26 − 12", 14, 1e-9, ("Pplat", 26, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]")),
        new(Evidence.Limit, "identity with the compliance: 420 / 30", 14, 1e-9, ("VT", 420, "mL"), ("Cstat", 30, "mL/cm[H2O]")),
    ];

    /// <summary>Both in cm[H2O].</summary>
    public static double Of(double plateau, double peep) => plateau - peep;

    private static double Compute(Roots x) => x.Has(Slots.Plateau) && x.Has(Slots.Peep)
        ? Of(x[Slots.Plateau], x[Slots.Peep])
        : x[Slots.TidalVolume] / x[StaticCompliance.Value];
}
