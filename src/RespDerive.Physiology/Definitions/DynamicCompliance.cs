using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tidal volume over peak minus end-expiratory pressure: compliance and resistance together.</summary>
/// <remarks>
/// Cdyn = VT / (Ppeak − PEEPtot). Contains the resistive pressure drop, so it is at most the static compliance at constant flow.
/// Never reported as static compliance.
/// </remarks>
public sealed class DynamicCompliance : Definition
{
    private static readonly Slot Anchor = new(Kinds.Peak, new Pairing.AnchorItself());

    private static readonly FlagRule PeakBelowPlateau = new(Flags.PeakBelowPlateau, [Kinds.Plateau], x => x.Has(Kinds.Plateau) && x[Anchor] < x[Kinds.Plateau]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dynamic-compliance", "Cdyn", "dynamic compliance of the respiratory system", "mL/cm[H2O]", 2, 200,
        Tolerance.Deviation(0, 0.15, "typical"), [Anchor, Slots.TidalVolume, Slots.Peep],
        x => Of(x[Slots.TidalVolume], x[Anchor], x[Slots.Peep]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Tidal volume divided by the difference of peak pressure and total PEEP.";

    /// <inheritdoc/>
    public override string Equation => "Cdyn = VT / (Ppeak − PEEPtot)";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient; peak pressure and volume of one breath; total PEEP.";

    /// <inheritdoc/>
    public override string Caution => "Contains airway resistance: not a static compliance. With set PEEP and unseen intrinsic PEEP it reads falsely low; with patient effort falsely high.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (15, 80);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Peak]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [("VT", 420, "mL"), ("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("patient_effort", "true")] },
        new Gate(Withheld.NonPositiveDrivingPressure, "peak pressure is not above total PEEP", [],
            x => x.Has(Anchor) && x.Has(Slots.Peep) && x[Anchor] <= x[Slots.Peep], ("VT", 420, "mL"), ("Ppeak", 10, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed, PeakBelowPlateau];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.30;

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Loinc("60827-3", "Dynamic lung compliance"), StandardCode.Mdc("152600", "MDC_COMPL_LUNG_DYNAMIC")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 420 / (31 − 10)", 20, 1e-9, ("VT", 420, "mL"), ("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")),
        new(Evidence.Limit, "without resistance peak equals plateau and it is the static compliance: 420 / (24 − 10)", 30, 1e-9, ("VT", 420, "mL"), ("Ppeak", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")),
    ];

    /// <summary>Volume in mL, pressures in cm[H2O].</summary>
    public static double Of(double volume, double peak, double peep) => volume / (peak - peep);
}
