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
    /// <param name="At">Time of the last wanted step; null when none was seen.</param>
    /// <param name="EarlierKnown">True when more than one value is known, or the only one is old enough to have settled.</param>
    /// <param name="Readings">The two readings around the step.</param>
    public sealed record Change(DateTimeOffset? At, bool EarlierKnown, IReadOnlyList<Reading> Readings);

    /// <summary>True when a step is as large as the least one, whatever its sign.</summary>
    public static bool IsStep(double step, double least) => Math.Abs(step) >= least - Slack;

    /// <summary>The last wanted step at or before an anchor, of settings or unspecified values of the kinds, streamed measurements left out.</summary>
    public static Change LastStep(IReadOnlyList<Kind> kinds, Func<double, bool> wanted, DateTimeOffset at, Slice slice, Policy policy)
    {
        var values = new List<Reading>();
        foreach (var kind in kinds)
        {
            foreach (var reading in slice.Between(kind, at.Minus(Reach.SettlingWindow), at))
            {
                values.Add(reading);
            }

            if (InForceReadings.LastBefore(kind, at, slice, policy) is { } before)
            {
                values.Add(before);
            }
        }

        values.RemoveAll(reading => !reading.Usable || (reading.Streamed && reading.Kind.Origin != Origin.Setting));
        values.Sort(Slice.Order);
        for (var i = values.Count - 1; i > 0; i--)
        {
            if (wanted(values[i].Value - values[i - 1].Value))
            {
                return new Change(values[i].At, true, [values[i - 1], values[i]]);
            }
        }

        var settled = values.Count == 1 && at - values[0].At >= Reach.SettlingWindow;
        return new Change(null, values.Count > 1 || settled, values.Count > 0 ? [values[^1]] : []);
    }
}
