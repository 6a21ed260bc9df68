using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Steps of a setting: when it was last changed before an anchor, and whether an earlier value is known at all.</summary>
internal static class SettingChanges
{
    /// <summary>Least step of FiO2 that is a change.</summary>
    public const double OxygenStep = 0.03;

    /// <summary>Least step of PEEP that is a change, cm[H2O].</summary>
    public const double PeepStep = 1;

    /// <summary>Room for binary representation of steps that are exact on paper.</summary>
    private const double Slack = 1e-9;

    /// <summary>What is known of the last change.</summary>
    /// <param name="At">Time of the last step; null when none was seen.</param>
    /// <param name="By">Signed size of the step.</param>
    /// <param name="EarlierKnown">True when more than one value is known, or the only one is old enough to have settled.</param>
    /// <param name="Readings">The two readings around the step.</param>
    public sealed record Change(DateTimeOffset? At, double By, bool EarlierKnown, IReadOnlyList<Reading> Readings);

    /// <summary>The last step at or before an anchor, of settings or unspecified values of the kinds, streamed measurements left out.</summary>
    public static Change LastStep(IReadOnlyList<Kind> kinds, double least, DateTimeOffset at, Slice slice, TimeSpan maxAge)
    {
        var values = new List<Reading>();
        foreach (var kind in kinds)
        {
            foreach (var reading in slice.Between(kind, at.Minus(Reach.SettlingWindow), at))
            {
                values.Add(reading);
            }

            if (slice.Last([kind], at.Minus(Reach.SettlingWindow).Minus(TimeSpan.FromTicks(1)), maxAge) is { } before)
            {
                values.Add(before);
            }
        }

        values.RemoveAll(reading => !reading.Usable || (reading.Streamed && reading.Kind.Origin != Origin.Setting));
        values.Sort(Slice.Order);
        for (var i = values.Count - 1; i > 0; i--)
        {
            var step = values[i].Value - values[i - 1].Value;
            if (Math.Abs(step) >= least - Slack)
            {
                return new Change(values[i].At, step, true, [values[i - 1], values[i]]);
            }
        }

        var settled = values.Count == 1 && at - values[0].At >= Reach.SettlingWindow;
        return new Change(null, 0, values.Count > 1 || settled, values.Count > 0 ? [values[^1]] : []);
    }
}
