using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tidal volume scaled to predicted body weight.</summary>
/// <remarks>
/// VT / PBW. Expired volume over delivered volume. Dividing by the actual weight of a heavy patient hides a large breath.
/// </remarks>
public sealed class TidalVolumePerPbw : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("tidal-volume-per-pbw", "VTkg", "tidal volume per predicted body weight", "mL/kg", 0.5, 20,
        Tolerance.Deviation(0, 0.1, "typical"), [Slots.TidalVolumeAnchor, new Slot(PredictedBodyWeight.Value, new Pairing.Standing())],
        x => Of(x[Slots.TidalVolumeAnchor], x[PredictedBodyWeight.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Tidal volume divided by predicted body weight.";

    /// <inheritdoc/>
    public override string Equation => "VTkg = VT / PBW";

    /// <inheritdoc/>
    public override string Assumptions => "As for predicted body weight; tidal volume measured, without a large leak.";

    /// <inheritdoc/>
    public override string Caution => "Adults only. Check the source of height and sex. Set volume is not delivered volume.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (4, 10);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.TidalVolumeExpired, Kinds.TidalVolume]) { OnlyWith = Slots.Ventilated };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.SexKnown with { TrippedBy = [("VT", 438, "mL"), ("sex", "unknown"), ("height", 170, "cm")] },
        CommonGates.Adult with { TrippedBy = [("VT", 438, "mL"), ("sex", "male"), ("height", 170, "cm"), ("age", 12, "a")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.AgeUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Mdc("153208", "MDC_VOL_AWAY_TIDAL_PER_IBW")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Acute Respiratory Distress Syndrome Network. Ventilation with lower tidal volumes. N Engl J Med 2000;342:1301", "10.1056/NEJM200005043421801"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 438 / 73", 6, 1e-9, ("VT", 438, "mL"), ("PBW", 73, "kg")),
        new(Evidence.Published, "ARDS Network table: male, 70 inches, 6 mL/kg is 440 mL (rounded to 10 mL; card from memory)", 6, 0.08, ("VT", 440, "mL"), ("sex", "male"), ("height", 70, "[in_i]")),
    ];

    /// <summary>Tidal volume in mL, predicted body weight in kg.</summary>
    public static double Of(double volume, double weight) => volume / weight;
}
