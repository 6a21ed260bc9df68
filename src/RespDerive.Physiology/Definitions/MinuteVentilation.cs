using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ventilation per minute, from tidal volume and rate.</summary>
/// <remarks>
/// VE = VT·RR / 1000 with VT in mL. Second best: a measured expired minute volume is preferred wherever there is one.
/// </remarks>
public sealed class MinuteVentilation : Definition
{
    private static readonly Slot Rate = new(Kinds.RateTotal, new Pairing.Nearest(TimeSpan.FromMinutes(2), TimeSpan.FromMinutes(2)));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minute-ventilation", "VE", "minute ventilation", "L/min", 0.5, 60,
        Tolerance.Deviation(0, 0.09, "typical"), [Slots.TidalVolumeAnchor, Rate], x => Of(x[Slots.TidalVolumeAnchor], x[Rate]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Tidal volume times total breath rate.";

    /// <inheritdoc/>
    public override string Equation => "VE = VT·RR / 1000";

    /// <inheritdoc/>
    public override string Assumptions => "Breaths of equal size; volume and rate within 2 min of each other.";

    /// <inheritdoc/>
    public override string Caution => "One breath stands for all: unreliable when breaths vary. Set volume is not delivered volume.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (5, 12);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.TidalVolumeExpired, Kinds.TidalVolume]) { NotWith = [Kinds.MinuteVolumeExpired] };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Definition; common practice, no single source"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 420·22 / 1000", 9.24, 1e-9, ("VT", 420, "mL"), ("RR", 22, "/min")),
        new(Evidence.Limit, "one breath a second of half a litre is 30 L/min", 30, 1e-9, ("VT", 0.5, "L"), ("RR", 1, "/s")),
    ];

    /// <summary>Tidal volume in mL, rate per minute.</summary>
    public static double Of(double volume, double rate) => volume * rate / 1000;
}
