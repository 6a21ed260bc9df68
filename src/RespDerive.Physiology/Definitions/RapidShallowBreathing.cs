using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Breath rate over tidal volume in spontaneous breathing.</summary>
/// <remarks>
/// RSBI = 1000·RR / VT, VT in mL, so breaths per minute per litre. Described for a minute of breathing room air through a T-piece;
/// with support it reads lower, which the result names.
/// </remarks>
public sealed class RapidShallowBreathing : Definition
{
    private static readonly Pairing.Nearest Near = new(TimeSpan.FromMinutes(2), TimeSpan.FromMinutes(2));

    private static readonly Slot Volume = new("tidal volume of spontaneous breaths",
        [new Option(Kinds.TidalVolumeSpontaneous, new Pairing.AnchorItself()), new Option(Kinds.TidalVolumeExpired, new Pairing.AnchorItself())]);

    private static readonly Slot Rate = new("spontaneous breath rate", [new Option(Kinds.RateSpontaneous, Near), new Option(Kinds.RateTotal, Near)]);

    /// <summary>Spontaneous breathing with what support; of no support nothing need be known.</summary>
    private static readonly Slot Spontaneous = new(Kinds.Mode.Name,
        [
            new Option([new Term(Kinds.Mode, new Pairing.InForce()), new Term(Kinds.PressureSupportSet, new Pairing.InForce())]),
            .. Slots.ModeKnown(Withheld.NotSpontaneous).Options,
        ],
        Withheld.NotSpontaneous);

    /// <summary>Smaller breaths are artefacts (mL).</summary>
    private const double LeastVolume = 50;

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("rsbi", "RSBI", "rapid shallow breathing index", "/min/L", 5, 500,
        Tolerance.Deviation(0, 0.1, "typical"), [Volume, Rate, Spontaneous], x => Of(x[Rate], x[Volume]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Spontaneous breath rate divided by tidal volume in litres.";

    /// <inheritdoc/>
    public override string Equation => "RSBI = 1000·RR / VT";

    /// <inheritdoc/>
    public override string Assumptions => "Adults breathing spontaneously, volume and rate over a minute or more. By hand spontaneous breathing is assumed unless the mode is given.";

    /// <inheritdoc/>
    public override string Caution =>
        "An adjunct, not a decision: a falsely low value invites early extubation, a falsely high one delay. Reads lower with "
        + "pressure support than without; note support and time since start.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (20, 130);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.TidalVolumeSpontaneous, Kinds.TidalVolumeExpired], Cadence.QuarterHour) { OnlyWith = [Kinds.Mode] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.NotSpontaneous, "the mode delivers mandatory breaths", [], x => x.Has(Kinds.Mode) && x.Code(Kinds.Mode) != "spontaneous", [.. Example, ("mode", "volume control")]),
        new Gate(Withheld.InputInvalid, "the tidal volume is under 50 mL", [], x => x.Has(Volume) && x[Volume] < LeastVolume, ("RR", 30, "/min"), ("VT", 40, "mL")),
        CommonGates.Adult with { TrippedBy = [.. Example, ("age", 12, "a")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.AgeUnconfirmed, Supported];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Yang KL, Tobin MJ. A prospective study of indexes predicting the outcome of trials of weaning from mechanical ventilation. N Engl J Med 1991;324:1445 (from memory)", "10.1056/NEJM199105233242101"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "worked example of a public encyclopedia article on the index: 25 breaths of 250 mL", 100, 1e-9, ("RR", 25, "/min"), ("VT", 0.25, "L")),
        new(Evidence.Published, "worked example of a public encyclopedia article on the index: 12 breaths of 420 mL, printed as 28", 28, 0.6, ("RR", 12, "/min"), ("VT", 420, "mL")),
    ];

    private static Given[] Example => [("RR", 25, "/min"), ("VT", 250, "mL")];

    private static readonly FlagRule Supported = new(Flags.OnPressureSupport, [Kinds.PressureSupportSet],
        x => x.Has(Kinds.PressureSupportSet) && x[Kinds.PressureSupportSet] > 0);

    /// <summary>Rate per minute, volume in mL.</summary>
    public static double Of(double rate, double volume) => 1000 * rate / volume;
}
