using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tidal volume that amounts to a given volume per predicted body weight.</summary>
/// <remarks>
/// VT = target·PBW. Arithmetic, not an order; the ARDS Network card rounds it to 10 mL.
/// </remarks>
public sealed class TidalVolumeForTarget : Definition
{
    private static readonly Slot Target = new(Kinds.TidalVolumeTarget, new Pairing.ByHand());

    private static readonly Slot Weight = new(PredictedBodyWeight.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("tidal-volume-for-target", "VTgoal", "tidal volume for a wanted volume per predicted body weight", "mL", 50, 1650,
        Tolerance.Deviation(0, 0.04, "height"), [Target, Weight], x => Of(x[Target], x[Weight]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Wanted volume per predicted body weight times that weight.";

    /// <inheritdoc/>
    public override string Equation => "VTgoal = target·PBW";

    /// <inheritdoc/>
    public override string Assumptions => "As for predicted body weight. The target is whoever computes it's own; none is assumed.";

    /// <inheritdoc/>
    public override string Caution => "Arithmetic, not an order: local policy and the treating clinician decide. Adults only; a wrong height or sex means too large a breath.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (200, 700);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind> { ["target"] = Kinds.TidalVolumeTarget };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.SexKnown with { TrippedBy = [("target", 6, "mL/kg"), ("sex", "unknown"), ("height", 170, "cm")] },
        CommonGates.Adult with { TrippedBy = [("target", 6, "mL/kg"), ("sex", "male"), ("height", 170, "cm"), ("age", 12, "a")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.AgeUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Acute Respiratory Distress Syndrome Network. Ventilation with lower tidal volumes. N Engl J Med 2000;342:1301", "10.1056/NEJM200005043421801"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "ARDS Network card (from memory, rounded to 10 mL): male, 70 inches, 6 mL/kg, 440 mL", 440, 5.01, ("target", 6, "mL/kg"), ("sex", "male"), ("height", 70, "[in_i]")),
        new(Evidence.Limit, "exact on paper: 6·45.5", 273, 1e-9, ("target", 6, "mL/kg"), ("PBW", 45.5, "kg")),
    ];

    /// <summary>Target in mL/kg, weight in kg.</summary>
    public static double Of(double target, double weight) => target * weight;
}
