using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>One patient's timeline in memory: for files, where a patient's whole history is at hand, and for tests.</summary>
public sealed class InMemoryHistory : IPatientHistory
{
    private static readonly TimeSpan CopyWindow = TimeSpan.FromMinutes(2);
    private readonly Dictionary<ResourceKey, IReadOnlyList<Reading>> _readings = [];
    private readonly Dictionary<Guid, Outcome> _outcomes = [];

    /// <inheritdoc/>
    public Person? Person { get; private set; }

    /// <summary>Current outcomes, in no particular order.</summary>
    public IReadOnlyCollection<Outcome> All => _outcomes.Values;

    /// <summary>How many readings there are.</summary>
    public int Count => _readings.Values.Sum(readings => readings.Count);

    /// <inheritdoc/>
    public IReadOnlyList<Reading> ReadingsOf(ResourceKey resource) => _readings.GetValueOrDefault(resource, []);

    /// <inheritdoc/>
    public IReadOnlyList<Outcome> Outcomes(string definition, DateTimeOffset from, DateTimeOffset to) =>
        [.. _outcomes.Values.Where(outcome => outcome.Definition == definition && outcome.At >= from && outcome.At <= to)];

    /// <inheritdoc/>
    public IReadOnlyList<Reading> Readings(IReadOnlyList<KindRange> ranges)
    {
        var byKind = _readings.Values.SelectMany(readings => readings).ToLookup(reading => reading.Kind);
        return [.. ranges.SelectMany(range => In(byKind[range.Kind], range)).DistinctBy(reading => reading.Id)];
    }

    /// <summary>Carries out what a turn worked out.</summary>
    public void Apply(TurnChanges changes)
    {
        foreach (var resource in changes.Replaced)
        {
            _readings.Remove(resource);
        }

        foreach (var group in changes.Readings.GroupBy(reading => reading.Id.Resource))
        {
            _readings[group.Key] = [.. group];
        }

        Person = changes.Person ?? Person;
        foreach (var change in changes.Outcomes)
        {
            if (change.Now is null)
            {
                _outcomes.Remove(change.Identity);
            }
            else
            {
                _outcomes[change.Identity] = change.Now;
            }
        }
    }

    private static IEnumerable<Reading> In(IEnumerable<Reading> readings, KindRange range)
    {
        var inside = readings.Where(reading => reading.At >= range.From && reading.At <= range.To);
        var before = range.Back > TimeSpan.Zero
            ? readings.Where(reading => reading.At < range.From && reading.At >= range.From.Minus(range.Back)).ToArray()
            : [];
        var last = before.Length == 0 ? range.From : before.Max(reading => reading.At);
        return inside.Concat(before.Where(reading => reading.At >= last.Minus(CopyWindow)));
    }
}
