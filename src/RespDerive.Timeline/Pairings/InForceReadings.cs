using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Settings in force at a time: the last one, not older than its source's settings last, and not ended by an event.</summary>
internal static class InForceReadings
{
    /// <summary>The last reading of the kinds that is in force; a refused one is given too, since it blocks.</summary>
    public static Reading? At(IReadOnlyList<Kind> kinds, DateTimeOffset at, Slice slice, Policy policy) =>
        slice.Last(kinds, at, policy.LongestSetting) is { } last && at - last.At <= MaxAge(last, policy) && !Ended(last, at, slice) ? last : null;

    /// <summary>The last reading before the hour in which changes count, if it was still in force at the anchor.</summary>
    public static Reading? LastBefore(Kind kind, DateTimeOffset at, Slice slice, Policy policy)
    {
        var before = at.Minus(Reach.SettlingWindow).Minus(TimeSpan.FromTicks(1));
        return slice.Last([kind], before, policy.LongestSetting) is { } last && at - last.At <= MaxAge(last, policy) ? last : null;
    }

    private static TimeSpan MaxAge(Reading setting, Policy policy) => policy.TimingOf(setting.Id.Resource.Source).SettingMaxAge;

    /// <summary>The end of support ends every setting; the end of an encounter those made in it.</summary>
    private static bool Ended(Reading setting, DateTimeOffset at, Slice slice)
    {
        var after = setting.At.Plus(TimeSpan.FromTicks(1));
        if (slice.Between(Events.SupportEnd, after, at).Length > 0)
        {
            return true;
        }

        foreach (var end in slice.Between(Events.EncounterEnd, after, at))
        {
            if (setting.Encounter is not null && setting.Encounter == end.Encounter)
            {
                return true;
            }
        }

        return false;
    }
}
