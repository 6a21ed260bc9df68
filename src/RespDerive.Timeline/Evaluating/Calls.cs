using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>An anchor that calls for a value.</summary>
/// <param name="Anchor">The reading.</param>
/// <param name="Quarter">Start of the quarter of an hour that stands for the anchor in the identity; null when the anchor stands for itself.</param>
internal readonly record struct Call(Reading Anchor, DateTimeOffset? Quarter);

/// <summary>Which readings call for a definition: context and cadence.</summary>
internal static class Calls
{
    private static readonly TimeSpan SameBreath = TimeSpan.FromMinutes(2);

    /// <summary>The calls with an event time in the range, in order.</summary>
    public static IReadOnlyList<Call> In(Definition definition, Slice slice, DateTimeOffset from, DateTimeOffset to)
    {
        var calls = new List<Call>();
        var rationed = new List<(Reading Reading, int Rank)>();
        var kinds = definition.Calling.Anchors;
        for (var rank = 0; rank < kinds.Count; rank++)
        {
            // A quarter of an hour is judged whole, whatever part of it the range covers.
            foreach (var reading in slice.Between(kinds[rank], from.QuarterStart(), to.QuarterEnd()))
            {
                if (definition.Calling.Cadence == Cadence.QuarterHour || reading.Streamed)
                {
                    rationed.Add((reading, rank));
                }
                else if (reading.At >= from && reading.At <= to && !IsOutranked(reading, kinds, slice))
                {
                    calls.Add(new Call(reading, null));
                }
            }
        }

        foreach (var quarter in rationed.GroupBy(entry => entry.Reading.At.QuarterStart()))
        {
            var first = quarter.OrderBy(entry => entry.Rank).ThenBy(entry => entry.Reading.At).ThenBy(entry => entry.Reading.Id).First().Reading;
            if (first.At >= from && first.At <= to)
            {
                calls.Add(new Call(first, quarter.Key));
            }
        }

        calls.RemoveAll(call => !InContext(definition.Calling, call.Anchor, slice));
        calls.Sort((a, b) => Slice.Order(a.Anchor, b.Anchor));
        return calls;
    }

    /// <summary>True when a reading of a better kind stands for the same breath.</summary>
    /// <param name="reading">A reading of one of the kinds.</param>
    /// <param name="kinds">Kinds, best first.</param>
    /// <param name="slice">The timeline.</param>
    public static bool IsOutranked(Reading reading, IReadOnlyList<Kind> kinds, Slice slice) =>
        kinds.TakeWhile(kind => kind != reading.Kind).Any(kind => slice.Between(kind, reading.At.Minus(SameBreath), reading.At.Plus(SameBreath)).Length > 0);

    private static bool InContext(Calling calling, Reading anchor, Slice slice) =>
        (calling.OnlyWith.Count == 0 || slice.Last(calling.OnlyWith, anchor.At, calling.Recent) is not null)
        && !calling.NotWith.Any(kind => Any(slice.Between(kind, anchor.At.Minus(calling.Around), anchor.At.Plus(calling.Around))));

    private static bool Any(ReadOnlySpan<Reading> readings)
    {
        foreach (var reading in readings)
        {
            if (reading.Usable)
            {
                return true;
            }
        }

        return false;
    }
}
