using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Barometric pressure at an anchor: from the policy, or a plausible reading; never assumed.</summary>
/// <param name="Value">mm[Hg].</param>
/// <param name="Tolerance">Tolerance when it is not the kind's own.</param>
/// <param name="Reading">The reading it is from, or that blocks; null when from the policy.</param>
internal sealed record SitePressure(double Value, Tolerance? Tolerance, Reading? Reading)
{
    private static readonly TimeSpan MaxAge = TimeSpan.FromHours(6);

    /// <summary>A weather report gives pressure at sea level; such a reading is this far from the altitude's standard value or more.</summary>
    private const double Plausible = 0.05;

    /// <summary>Weather moves pressure by ±15 mm[Hg] (k = 2) about the standard atmosphere; own judgement.</summary>
    private static readonly Tolerance OfAltitude = Tolerance.Deviation(7.5, 0, "standard atmosphere, weather ±15 mm[Hg], k = 2, own judgement");

    public static SitePressure? Of(Policy policy, Reading anchor, Slice slice)
    {
        if (policy.PressureMmHg is { } stated)
        {
            return new SitePressure(stated, null, null);
        }

        double? standard = policy.AltitudeMetres is { } metres ? StandardAtmosphere.PressureMmHg(metres) : null;
        Reading? latest = null;
        foreach (var reading in slice.Between(Kinds.BarometricPressure, anchor.At.Minus(MaxAge), anchor.At))
        {
            if (!reading.Usable || standard is not { } expected || Math.Abs(reading.Value - expected) <= Plausible * expected)
            {
                latest = reading;
            }
        }

        return latest is not null ? new SitePressure(latest.Value, null, latest)
            : standard is { } value ? new SitePressure(value, OfAltitude, null)
            : null;
    }
}
