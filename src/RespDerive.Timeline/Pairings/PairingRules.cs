using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>The pairing rules: which reading of a kind belongs to an anchor. Pure, and the only place that decides it.</summary>
internal static class PairingRules
{
    private static readonly TimeSpan OneMinute = TimeSpan.FromMinutes(1);
    private static readonly TimeSpan Unconfirmed = TimeSpan.FromMinutes(60);

    /// <summary>Greatest difference between two oxygen fractions of one minute that still agree.</summary>
    private const double OxygenAgreement = 0.05;

    public static Choice Choose(Pairing rule, IReadOnlyList<Kind> kinds, Reading anchor, Slice slice, Policy policy) => rule switch
    {
        Pairing.AnchorItself => kinds.Contains(anchor.Kind) ? Choice.Of(anchor) : Choice.Nothing,
        Pairing.InForce => InForce(kinds, anchor, slice, policy),
        Pairing.SinceChange since => SinceChange(since, kinds, anchor, slice, policy),
        Pairing.Nearest nearest => Choice.Of(Nearest([.. Within(kinds, anchor.At.Minus(nearest.Before), anchor.At.Plus(nearest.After), slice)
            .Where(reading => !Calls.IsOutranked(reading, kinds, slice))], anchor.At)),
        Pairing.SameSample => Choice.Of(SameSample(kinds, anchor, slice)),
        Pairing.SameManoeuvre same => Choice.Of(SameManoeuvre(same, kinds, anchor, slice)),
        Pairing.MedianOver median => MedianOver(median, kinds, anchor, slice),
        Pairing.Standing => Choice.Of(Standing(kinds, anchor, slice)),
        _ => Choice.Nothing,
    };

    /// <summary>The last setting at or before the anchor that is in force.</summary>
    private static Choice InForce(IReadOnlyList<Kind> kinds, Reading anchor, Slice slice, Policy policy)
    {
        var setting = InForceReadings.At(kinds, anchor.At, slice, policy);
        if (setting is null)
        {
            return Choice.Nothing;
        }

        return Disagreeing(setting, kinds, slice, anchor.At) is { } other
            ? Choice.Block(Withheld.ConflictingInputs, setting, other)
            : Choice.Of(setting, anchor.At - setting.At > Unconfirmed ? [Physiology.Flags.SettingUnconfirmed] : []);
    }

    private static Choice SinceChange(Pairing.SinceChange rule, IReadOnlyList<Kind> kinds, Reading anchor, Slice slice, Policy policy)
    {
        var measured = slice.Last(kinds, anchor.At, rule.MaxAge);
        if (measured is null)
        {
            return Choice.Nothing;
        }

        var change = SettingChanges.LastStep(rule.ChangeOf, step => SettingChanges.IsStep(step, SettingChanges.OxygenStep), anchor.At, slice, policy);
        if (change.At is { } at && at > measured.At)
        {
            return Choice.Nothing;
        }

        return Disagreeing(measured, kinds, slice, anchor.At) is { } other ? Choice.Block(Withheld.ConflictingInputs, measured, other) : Choice.Of(measured);
    }

    /// <summary>For oxygen fractions: a reading of equal rank within a minute, at or before the anchor, that differs by more than 0.05.</summary>
    private static Reading? Disagreeing(Reading chosen, IReadOnlyList<Kind> kinds, Slice slice, DateTimeOffset at)
    {
        if (!chosen.Usable || chosen.Kind.RangeCode != Withheld.Fio2UnitImplausible)
        {
            return null;
        }

        var latest = chosen.At.Plus(OneMinute) < at ? chosen.At.Plus(OneMinute) : at;
        return Within(kinds, chosen.At.Minus(OneMinute), latest, slice)
            .FirstOrDefault(other => other.Usable && other.Id != chosen.Id
                && (other.Device is null || other.Device != chosen.Device)
                && Math.Abs(other.Value - chosen.Value) > OxygenAgreement);
    }

    private static Reading? SameSample(IReadOnlyList<Kind> kinds, Reading anchor, Slice slice)
    {
        if (kinds.Contains(anchor.Kind))
        {
            return anchor;
        }

        var near = Within(kinds, anchor.At.Minus(Reach.SampleWindow), anchor.At.Plus(Reach.SampleWindow), slice);
        return Nearest([.. near.Where(reading => anchor.Specimen is not null && reading.Specimen == anchor.Specimen)], anchor.At)
            ?? Nearest([.. near.Where(reading => !OtherSpecimen(reading, anchor) && reading.Panels.Intersect(anchor.Panels, StringComparer.Ordinal).Any())], anchor.At)
            ?? Nearest([.. near.Where(reading => !OtherSpecimen(reading, anchor) && (reading.At - anchor.At).Duration() <= OneMinute)], anchor.At);
    }

    private static bool OtherSpecimen(Reading a, Reading b) => a.Specimen is not null && b.Specimen is not null && a.Specimen != b.Specimen;

    private static Reading? SameManoeuvre(Pairing.SameManoeuvre rule, IReadOnlyList<Kind> kinds, Reading anchor, Slice slice)
    {
        var near = Within(kinds, anchor.At.Minus(Reach.SampleWindow), anchor.At.Plus(Reach.SampleWindow), slice);
        return Nearest([.. near.Where(reading => reading.Panels.Intersect(anchor.Panels, StringComparer.Ordinal).Any())], anchor.At)
            ?? Nearest([.. near.Where(reading => anchor.Device is not null && reading.Device == anchor.Device && (reading.At - anchor.At).Duration() <= OneMinute)], anchor.At)
            ?? Nearest([.. near.Where(reading => (reading.At - anchor.At).Duration() <= rule.Within)], anchor.At);
    }

    /// <summary>The median of all readings in the window; a refused one among them blocks, as everywhere.</summary>
    private static Choice MedianOver(Pairing.MedianOver rule, IReadOnlyList<Kind> kinds, Reading anchor, Slice slice)
    {
        var near = Within(kinds, anchor.At.Minus(rule.Before), anchor.At.Plus(rule.After), slice);
        return near.FirstOrDefault(reading => !reading.Usable) is { } refused ? Choice.Of(refused)
            : near.Length >= Math.Max(1, rule.AtLeast) ? Choice.Median(near)
            : Choice.Nothing;
    }

    private static Reading? Standing(IReadOnlyList<Kind> kinds, Reading anchor, Slice slice)
    {
        if (kinds.Contains(anchor.Kind))
        {
            return anchor;
        }

        return slice.Last(kinds, anchor.At, TimeSpan.MaxValue)
            ?? Within(kinds, anchor.At, DateTimeOffset.MaxValue, slice).FirstOrDefault(reading => anchor.Encounter is null || reading.Encounter == anchor.Encounter);
    }

    private static Reading[] Within(IReadOnlyList<Kind> kinds, DateTimeOffset from, DateTimeOffset to, Slice slice)
    {
        if (kinds.Count == 1)
        {
            return slice.Between(kinds[0], from, to).ToArray();
        }

        var all = new List<Reading>();
        foreach (var kind in kinds)
        {
            all.AddRange(slice.Between(kind, from, to));
        }

        all.Sort(Slice.Order);
        return [.. all];
    }

    /// <summary>The closest in time; of two equally close the earlier, of two at one time the smaller identity.</summary>
    private static Reading? Nearest(Reading[] readings, DateTimeOffset at) =>
        readings.Length == 0 ? null : readings.MinBy(reading => (reading.At - at).Duration());
}
