using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Elastance of the respiratory system: the inverse of its static compliance.</summary>
/// <remarks>
/// E = 1000 / Cstat, Cstat in mL/cm[H2O]. Elastances of lung and chest wall add up to it; compliances do not add.
/// </remarks>
public sealed class Elastance : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("elastance", "Ers", "static elastance of the respiratory system", "cm[H2O]/L", 3, 400,
        Tolerance.Deviation(0, 0.18, "typical"), [new Slot(StaticCompliance.Value, new Pairing.AnchorItself())], x => Of(x[StaticCompliance.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override IReadOnlyList<string> Aliases => ["elastance-respiratory-system"];

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Inverse of the static compliance of the respiratory system.";

    /// <inheritdoc/>
    public override string Equation => "Ers = 1000 / Cstat";

    /// <inheritdoc/>
    public override string Assumptions => "As for static compliance.";

    /// <inheritdoc/>
    public override string Caution => "With set PEEP and unseen intrinsic PEEP it reads falsely high; with patient effort falsely low. Confirm hold and passivity.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (10, 50);

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
        new(Evidence.Limit, "inverse of a given compliance: 1000 / 40", 25, 1e-9, ("Cstat", 40, "mL/cm[H2O]")),
        new(Evidence.Limit, "exact on paper: (30 − 10) / 0.4", 50, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("VT", 0.4, "L")),
    ];

    /// <summary>Compliance in mL/cm[H2O].</summary>
    public static double Of(double compliance) => 1000 / compliance;
}
