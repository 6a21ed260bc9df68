using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>One patient's timeline in memory: for files, where a patient's whole history is at hand, and for tests.</summary>
public sealed class InMemoryHistory : IPatientHistory
{
    private static readonly TimeSpan CopyWindow = TimeSpan.FromMinutes(2);
    private readonly Dictionary<ResourceKey, IReadOnlyList<Reading>> _readings = [];
    private readonly Dictionary<Kind, SortedSet<Reading>> _byKind = [];
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
    public IReadOnlyList<Reading> Readings(IReadOnlyList<KindRange> ranges) =>
        [.. ranges.SelectMany(range => _byKind.TryGetValue(range.Kind, out var readings) ? In(readings, range) : []).DistinctBy(reading => reading.Id)];

    /// <summary>Carries out what a turn worked out.</summary>
    public void Apply(TurnChanges changes)
    {
        foreach (var resource in changes.Replaced)
        {
            if (_readings.Remove(resource, out var old))
            {
                foreach (var reading in old)
                {
                    _byKind[reading.Kind].Remove(reading);
                }
            }
        }

        foreach (var group in changes.Readings.GroupBy(reading => reading.Id.Resource))
        {
            _readings[group.Key] = [.. group];
            foreach (var reading in group)
            {
                (_byKind.TryGetValue(reading.Kind, out var readings) ? readings : _byKind[reading.Kind] = new(Order)).Add(reading);
            }
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

    private static readonly Comparer<Reading> Order = Comparer<Reading>.Create(Slice.Order);

    private static IEnumerable<Reading> In(SortedSet<Reading> readings, KindRange range)
    {
        var inside = Between(readings, range.From, range.To);
        if (range.Back <= TimeSpan.Zero)
        {
            return inside;
        }

        var last = Between(readings, range.From.Minus(range.Back), range.From.Minus(TimeSpan.FromTicks(1))).Max;
        return last is null ? inside : inside.Concat(Between(readings, last.At.Minus(CopyWindow), last.At));
    }

    private static SortedSet<Reading> Between(SortedSet<Reading> readings, DateTimeOffset from, DateTimeOffset to) =>
        from > to ? [] : readings.GetViewBetween(Bound(from, First), Bound(to, Last));

    /// <summary>Stands before or after every reading of one time.</summary>
    private static Reading Bound(DateTimeOffset at, string edge) => new()
    {
        Id = new ReadingId(new ResourceKey(edge, "", ""), ""),
        Version = "",
        Kind = Events.SupportEnd,
        At = at,
        AtText = "",
        Patient = "",
    };

    private const string First = "";
    private const string Last = "\uffff";
}
