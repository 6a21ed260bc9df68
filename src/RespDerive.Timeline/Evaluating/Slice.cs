using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>
/// The part of one patient's timeline that an evaluation looks at: readings by kind in event time, copies merged.
/// Deterministic order: event time, then identity.
/// </summary>
public sealed class Slice
{
    private static readonly TimeSpan OneMinute = TimeSpan.FromMinutes(1);
    private readonly Dictionary<Kind, Reading[]> _byKind;

    /// <summary>Takes readings in any order.</summary>
    public Slice(IEnumerable<Reading> readings, Person? person)
    {
        Person = person;
        _byKind = readings.GroupBy(reading => reading.Kind).ToDictionary(group => group.Key, WithoutCopies);
    }

    /// <summary>The person; null when no Patient resource is known.</summary>
    public Person? Person { get; }

    /// <summary>Every reading left after merging copies, by kind.</summary>
    public IReadOnlyList<Reading> Of(Kind kind) => _byKind.GetValueOrDefault(kind, []);

    /// <summary>Readings of a kind in a range, both ends inclusive.</summary>
    public ReadOnlySpan<Reading> Between(Kind kind, DateTimeOffset from, DateTimeOffset to)
    {
        var all = _byKind.GetValueOrDefault(kind, []);
        var first = FirstAtOrAfter(all, from);
        var end = first;
        while (end < all.Length && all[end].At <= to)
        {
            end++;
        }

        return all.AsSpan(first, end - first);
    }

    /// <summary>The last reading of any of the kinds at or before a time and not older than <paramref name="maxAge"/>; null when there is none.</summary>
    public Reading? Last(IReadOnlyList<Kind> kinds, DateTimeOffset at, TimeSpan maxAge)
    {
        Reading? last = null;
        foreach (var kind in kinds)
        {
            var all = _byKind.GetValueOrDefault(kind, []);
            var i = FirstAtOrAfter(all, at.Plus(TimeSpan.FromTicks(1))) - 1;
            if (i >= 0 && all[i].At >= at.Minus(maxAge) && (last is null || Order(all[i], last) > 0))
            {
                last = all[i];
            }
        }

        return last;
    }

    /// <summary>True when another source gives an unequal value of the same kind at the same time.</summary>
    public bool Contradicted(Reading reading)
    {
        foreach (var other in Between(reading.Kind, reading.At.Minus(OneMinute), reading.At.Plus(OneMinute)))
        {
            if (other.Usable && MayRepeat(reading, other) && !Equal(reading, other)
                && (reading.Kind.Origin != Origin.Setting || other.At == reading.At))
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>Event time, then identity.</summary>
    internal static int Order(Reading a, Reading b) => a.At.CompareTo(b.At) is var byTime and not 0 ? byTime : a.Id.CompareTo(b.Id);

    private static int FirstAtOrAfter(Reading[] all, DateTimeOffset time)
    {
        var (low, high) = (0, all.Length);
        while (low < high)
        {
            var middle = (low + high) / 2;
            (low, high) = all[middle].At < time ? (middle + 1, high) : (low, middle);
        }

        return low;
    }

    /// <summary>
    /// Drops each usable reading of which a preferred copy exists less than a minute away. The test looks at all neighbours, dropped or
    /// not, so that it depends on one minute to each side only. A reading with equal ones on both sides is one of a series, not a copy.
    /// </summary>
    private static Reading[] WithoutCopies(IEnumerable<Reading> readings)
    {
        var sorted = readings.ToArray();
        Array.Sort(sorted, Order);
        var kept = new List<Reading>(sorted.Length);
        for (var i = 0; i < sorted.Length; i++)
        {
            var (before, after) = (Repeats(sorted, i, -1), Repeats(sorted, i, 1));
            if ((before.Apart && after.Apart) || !(before.Preferred || after.Preferred))
            {
                kept.Add(sorted[i]);
            }
        }

        return [.. kept];
    }

    /// <summary>Looks to one side: is there a repeat at another time, and is there a preferred one?</summary>
    private static (bool Apart, bool Preferred) Repeats(Reading[] sorted, int i, int step)
    {
        var found = (Apart: false, Preferred: false);
        for (var j = i + step; j >= 0 && j < sorted.Length && (sorted[j].At - sorted[i].At).Duration() < OneMinute; j += step)
        {
            if (sorted[i].Usable && sorted[j].Usable && MayRepeat(sorted[i], sorted[j]) && Equal(sorted[i], sorted[j]))
            {
                found = (found.Apart || sorted[j].At != sorted[i].At, found.Preferred || Preferred(sorted[j], sorted[i]));
            }
        }

        return found;
    }

    /// <summary>Two resources can report one fact; one device reporting at two times reports two.</summary>
    private static bool MayRepeat(Reading a, Reading b) =>
        a.Id.Resource != b.Id.Resource && (a.At == b.At || a.Device is null || a.Device != b.Device);

    private static bool Equal(Reading a, Reading b) => a.Kind.IsCoded
        ? a.Value.Equals(b.Value)
        : Math.Abs(a.Value - b.Value) <= 0.005 * Math.Max(Math.Abs(a.Value), Math.Abs(b.Value));

    private static bool Preferred(Reading a, Reading b) =>
        (a.Specimen is not null) == (b.Specimen is not null) ? a.Id.CompareTo(b.Id) < 0 : a.Specimen is not null;
}
