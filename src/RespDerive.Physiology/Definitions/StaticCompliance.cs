using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Compliance of the respiratory system at zero flow.</summary>
/// <remarks>
/// Cstat = VT / (Pplat − PEEPtot). Plateau of an end-inspiratory hold and tidal volume of one breath, PEEP of an end-expiratory hold,
/// the patient passive. Lung and chest wall together.
/// </remarks>
public sealed class StaticCompliance : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("static-compliance", "Cstat", "static compliance of the respiratory system", "mL/cm[H2O]", 3, 200,
        Tolerance.Deviation(0, 0.18, "typical"), [Slots.Plateau, Slots.TidalVolume, Slots.Peep],
        x => Of(x[Slots.TidalVolume], x[Slots.Plateau], x[Slots.Peep]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Tidal volume divided by the difference of plateau pressure and total PEEP.";

    /// <inheritdoc/>
    public override string Equation => "Cstat = VT / (Pplat − PEEPtot)";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, flat plateau after a hold of at least 0.5 s, total PEEP; volume corrected for the circuit by the device.";

    /// <inheritdoc/>
    public override string Caution => "With set PEEP and unseen intrinsic PEEP it reads falsely low; with patient effort falsely high. Confirm hold and passivity.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (20, 100);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.PlateauMeasured,
        CommonGates.Passive,
        CommonGates.PlateauAbovePeep,
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.30;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 420 / (24 − 10)", 30, 1e-9, ("VT", 420, "mL"), ("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")),
        new(Evidence.Limit, "set and intrinsic PEEP add to the total: 450 / (25 − (5 + 5)), not 450 / (25 − 5)", 30, 1e-9, ("VT", 450, "mL"), ("Pplat", 25, "cm[H2O]"), ("PEEPset", 5, "cm[H2O]"), ("PEEPi", 5, "cm[H2O]")),
    ];

    /// <summary>Volume in mL, pressures in cm[H2O].</summary>
    public static double Of(double volume, double plateau, double peep) => volume / (plateau - peep);
}
