using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ventilation and carbon dioxide tension against what is predicted for the patient.</summary>
/// <remarks>
/// VR = VE·PaCO2 / (PBW·100·37.5), VE in mL/min, PaCO2 in mm[Hg]: 1 when 100 mL/kg/min holds PaCO2 at 37.5 mm[Hg].
/// An index of impaired carbon dioxide clearance; rises with dead space and with carbon dioxide production.
/// </remarks>
public sealed class VentilatoryRatio : Definition
{
    private static readonly TimeSpan QuarterHour = TimeSpan.FromMinutes(15);

    private static readonly Slot Anchor = new(Kinds.PaCO2, new Pairing.AnchorItself());

    /// <summary>Measured expired minute volume, else tidal volume times rate.</summary>
    private static readonly Slot Ventilation = new("minute ventilation",
        [
            new Option(Kinds.MinuteVolumeExpired, new Pairing.MedianOver(QuarterHour, TimeSpan.Zero, 1)),
            new Option(MinuteVentilation.Value, new Pairing.Nearest(QuarterHour, TimeSpan.Zero)),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("ventilatory-ratio", "VR", "ventilatory ratio", "1", 0.2, 8,
        Tolerance.Deviation(0, 0.11, "typical"), [Anchor, Ventilation, new Slot(PredictedBodyWeight.Value, new Pairing.Standing())],
        x => Of(x[Ventilation], x[Anchor], x[PredictedBodyWeight.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Minute ventilation times arterial carbon dioxide tension over their predicted product.";

    /// <inheritdoc/>
    public override string Equation => "VR = 1000·VE·PaCO2 / (PBW·100·37.5)";

    /// <inheritdoc/>
    public override string Assumptions => "Adults in a steady state; total minute volume including spontaneous breaths; predicted, never actual, body weight.";

    /// <inheritdoc/>
    public override string Caution => "Adults only. Changes with carbon dioxide production (fever, feeding) as well as with dead space. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.9, 2);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = Slots.Ventilated };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("PBW", 70, "kg"), ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("PBW", 70, "kg"), ("ecls", "true")] },
        CommonGates.SexKnown with { TrippedBy = [.. Example, ("sex", "unknown"), ("height", 170, "cm")] },
        CommonGates.Adult with { TrippedBy = [.. Example, ("sex", "male"), ("height", 170, "cm"), ("age", 12, "a")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling, CommonGates.AgeUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Sinha P et al. Ventilatory ratio: a simple bedside measure of ventilation. Br J Anaesth 2009;102:692, abstract", "10.1093/bja/aep054"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "reference point of Sinha 2009: 100 mL/kg/min and 37.5 mm[Hg]", 1, 1e-9, ("VE", 7000, "mL/min"), ("PaCO2", 37.5, "mm[Hg]"), ("PBW", 70, "kg")),
        new(Evidence.Limit, "proportional to volume and tension: twice 7 L/min at twice 37.5 mm[Hg]", 4, 1e-9, ("VT", 500, "mL"), ("RR", 28, "/min"), ("PaCO2", 75, "mm[Hg]"), ("PBW", 70, "kg")),
    ];

    private static Given[] Example => [("VE", 7, "L/min"), ("PaCO2", 37.5, "mm[Hg]")];

    /// <summary>Ventilation in L/min, PaCO2 in mm[Hg], predicted body weight in kg.</summary>
    public static double Of(double ventilation, double paco2, double weight) => 1000 * ventilation * paco2 / (weight * 100 * 37.5);
}
