using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>What one resource says now: its readings replace whatever it said before.</summary>
/// <param name="Resource">The resource.</param>
/// <param name="Readings">Its readings of this patient; empty when it was withdrawn, moved, or says nothing of use.</param>
public sealed record Replacement(ResourceKey Resource, IReadOnlyList<Reading> Readings);

/// <summary>
/// One turn of a patient: changed readings dirty the anchors within their windows, at their old and their new place;
/// dirty anchors are evaluated whole and compared with what is stored.
/// </summary>
public static class Turn
{
    private sealed record Range(DateTimeOffset From, DateTimeOffset To);

    /// <summary>Works out what changes.</summary>
    /// <param name="evaluator">The pure core.</param>
    /// <param name="history">What is stored.</param>
    /// <param name="replacements">Resources read in this turn.</param>
    /// <param name="person">The person's facts when a Patient resource was read in this turn; null otherwise.</param>
    public static TurnChanges Run(Evaluator evaluator, IPatientHistory history, IReadOnlyList<Replacement> replacements, Person? person)
    {
        var replaced = replacements.Select(replacement => replacement.Resource).ToHashSet();
        var before = replacements.SelectMany(replacement => history.ReadingsOf(replacement.Resource)).ToArray();
        var now = replacements.SelectMany(replacement => replacement.Readings).ToArray();
        var personChanged = person is not null && (person.Sex, person.BirthDate) != (history.Person?.Sex, history.Person?.BirthDate);
        var changed = Changed(before, now);
        var outcomes = new List<OutcomeChange>();
        var dirty = new List<(Definition Definition, Range Range)>();
        foreach (var definition in evaluator.Called)
        {
            dirty.AddRange(Merge(Dirtied(evaluator.ReachOf(definition), changed, personChanged)).Select(range => (definition, range)));
        }

        if (dirty.Count > 0)
        {
            var wanted = KindRanges(evaluator, dirty);
            var readings = history.Readings(wanted).Where(reading => !replaced.Contains(reading.Id.Resource)).Concat(now);
            var slice = new Slice(readings, person ?? history.Person);
            foreach (var (definition, range) in dirty)
            {
                outcomes.AddRange(Compare(history.Outcomes(definition.Key, range.From, range.To), evaluator.Evaluate(definition, slice, range.From, range.To)));
            }
        }

        return new TurnChanges
        {
            Replaced = [.. replaced.Order()],
            Readings = now,
            Person = person != history.Person ? person : null,
            Outcomes = Settle(outcomes),
        };
    }

    /// <summary>Readings that appeared, vanished or differ.</summary>
    private static Reading[] Changed(Reading[] before, Reading[] now)
    {
        var old = before.ToLookup(reading => reading.Id);
        var fresh = now.ToLookup(reading => reading.Id);
        return
        [
            .. before.Where(reading => !fresh[reading.Id].Any(other => SameReading(reading, other))),
            .. now.Where(reading => !old[reading.Id].Any(other => SameReading(reading, other))),
        ];
    }

    private static bool SameReading(Reading a, Reading b) =>
        a with { Panels = [], Flags = [] } == b with { Panels = [], Flags = [] }
        && a.Panels.SequenceEqual(b.Panels, StringComparer.Ordinal)
        && a.Flags.SequenceEqual(b.Flags, StringComparer.Ordinal);

    private static IEnumerable<Range> Dirtied(Reach reach, Reading[] changed, bool personChanged)
    {
        if (personChanged && reach.Person)
        {
            yield return new Range(DateTimeOffset.MinValue, DateTimeOffset.MaxValue);
            yield break;
        }

        foreach (var reading in changed)
        {
            if (reach.Spans.TryGetValue(reading.Kind, out var span))
            {
                var after = span.Before > span.Back ? span.Before : span.Back;
                yield return new Range(reading.At.Minus(span.After).QuarterStart(), reading.At.Plus(after).QuarterEnd());
            }
        }
    }

    private static List<Range> Merge(IEnumerable<Range> ranges)
    {
        var merged = new List<Range>();
        foreach (var range in ranges.OrderBy(range => range.From))
        {
            if (merged.Count > 0 && range.From <= merged[^1].To)
            {
                merged[^1] = merged[^1] with { To = range.To > merged[^1].To ? range.To : merged[^1].To };
            }
            else
            {
                merged.Add(range);
            }
        }

        return merged;
    }

    /// <summary>The readings that evaluating the dirty ranges may look at.</summary>
    private static KindRange[] KindRanges(Evaluator evaluator, IReadOnlyList<(Definition Definition, Range Range)> dirty) =>
        [.. dirty.SelectMany(entry => evaluator.ReachOf(entry.Definition).Spans.Select(pair => new KindRange(
                pair.Key, entry.Range.From.Minus(pair.Value.Before), entry.Range.To.Plus(pair.Value.After), pair.Value.Back)))
            .GroupBy(range => range.Kind)
            .SelectMany(Union)];

    /// <summary>Unites overlapping ranges of one kind; the look back is counted from the earliest start.</summary>
    private static IEnumerable<KindRange> Union(IGrouping<Kind, KindRange> ranges)
    {
        KindRange? open = null;
        foreach (var range in ranges.OrderBy(range => range.From))
        {
            if (open is null || range.From > open.To)
            {
                if (open is not null)
                {
                    yield return open;
                }

                open = range;
            }
            else
            {
                var shift = range.From - open.From;
                open = open with
                {
                    To = range.To > open.To ? range.To : open.To,
                    Back = range.Back > TimeSpan.Zero && range.Back.And(shift) > open.Back ? range.Back.And(shift) : open.Back,
                };
            }
        }

        if (open is not null)
        {
            yield return open;
        }
    }

    private static IEnumerable<OutcomeChange> Compare(IReadOnlyList<Outcome> stored, IReadOnlyList<Outcome> computed)
    {
        var old = stored.ToDictionary(outcome => outcome.Identity);
        foreach (var outcome in computed)
        {
            if (!old.Remove(outcome.Identity, out var known))
            {
                yield return new OutcomeChange(outcome.Identity, null, outcome);
            }
            else if (!OutcomeComparison.Same(known, outcome))
            {
                yield return new OutcomeChange(outcome.Identity, known, outcome);
            }
        }

        foreach (var gone in old.Values.OrderBy(outcome => outcome.Identity))
        {
            yield return new OutcomeChange(gone.Identity, gone, null);
        }
    }

    /// <summary>An anchor that moved in time is gone from one range and new in another: one change of one result.</summary>
    private static OutcomeChange[] Settle(List<OutcomeChange> changes) =>
        [.. changes.GroupBy(change => change.Identity)
            .Select(group => new OutcomeChange(group.Key,
                group.Select(change => change.Before).FirstOrDefault(outcome => outcome is not null),
                group.Select(change => change.Now).FirstOrDefault(outcome => outcome is not null)))
            .Where(change => change.Before is null || change.Now is null || !OutcomeComparison.Same(change.Before, change.Now))];
}
