using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Static compliance scaled to predicted body weight.</summary>
/// <remarks>
/// Cstat / PBW. A measure of how much lung is open rather than of its stiffness. Never with the actual weight.
/// </remarks>
public sealed class CompliancePerPbw : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("compliance-per-pbw", "CstatKg", "static compliance per predicted body weight", "mL/cm[H2O]/kg", 0.05, 3,
        Tolerance.Deviation(0, 0.18, "typical"), [new Slot(StaticCompliance.Value, new Pairing.AnchorItself()), new Slot(PredictedBodyWeight.Value, new Pairing.Standing())],
        x => Of(x[StaticCompliance.Value], x[PredictedBodyWeight.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Mechanics";

    /// <inheritdoc/>
    public override string Summary => "Static compliance of the respiratory system divided by predicted body weight.";

    /// <inheritdoc/>
    public override string Equation => "CstatKg = Cstat / PBW";

    /// <inheritdoc/>
    public override string Assumptions => "As for static compliance and for predicted body weight; no range given by a source.";

    /// <inheritdoc/>
    public override string Caution => "Adults only. With set PEEP and unseen intrinsic PEEP it reads falsely low; with patient effort falsely high. Check the source of height and sex.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.3, 1.2);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"), ("VT", 420, "mL"), ("PBW", 66, "kg")] },
        CommonGates.SexKnown with { TrippedBy = [("Cstat", 30, "mL/cm[H2O]"), ("sex", "unknown"), ("height", 170, "cm")] },
        CommonGates.Adult with { TrippedBy = [("Cstat", 30, "mL/cm[H2O]"), ("sex", "male"), ("height", 170, "cm"), ("age", 12, "a")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed, CommonGates.AgeUnconfirmed];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.30;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
        new("Acute Respiratory Distress Syndrome Network. N Engl J Med 2000;342:1301 (predicted body weight)", "10.1056/NEJM200005043421801"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 33 / 66", 0.5, 1e-9, ("Cstat", 33, "mL/cm[H2O]"), ("PBW", 66, "kg")),
        new(Evidence.Limit, "tidal volume of 6 mL/kg over a driving pressure of 12 cm[H2O], whatever the weight: (420 / 12) / 70 = 6 / 12", 0.5, 1e-9, ("VT", 420, "mL"), ("Pplat", 22, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("PBW", 70, "kg")),
    ];

    private static Given[] Example => [("Cstat", 30, "mL/cm[H2O]"), ("PBW", 66, "kg")];

    /// <summary>Compliance in mL/cm[H2O], weight in kg.</summary>
    public static double Of(double compliance, double weight) => compliance / weight;
}
