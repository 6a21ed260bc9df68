using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>Readings of one kind that an evaluation may look at.</summary>
/// <param name="Kind">The kind.</param>
/// <param name="From">Earliest event time, inclusive.</param>
/// <param name="To">Latest event time, inclusive.</param>
/// <param name="Back">
/// When positive: also the last reading before <paramref name="From"/> that is not older than this before it,
/// together with all readings of the kind within two minutes before that one (they may be copies of it).
/// </param>
public sealed record KindRange(Kind Kind, DateTimeOffset From, DateTimeOffset To, TimeSpan Back);

/// <summary>What is stored of one patient: read-only, as of the start of a turn.</summary>
public interface IPatientHistory
{
    /// <summary>The current Patient version's facts; null when none is known.</summary>
    Person? Person { get; }

    /// <summary>Readings of the ranges, in any order, without duplicates.</summary>
    IReadOnlyList<Reading> Readings(IReadOnlyList<KindRange> ranges);

    /// <summary>Readings of one resource as stored.</summary>
    IReadOnlyList<Reading> ReadingsOf(ResourceKey resource);

    /// <summary>Current outcomes of a definition with an event time in the range, both ends inclusive.</summary>
    IReadOnlyList<Outcome> Outcomes(string definition, DateTimeOffset from, DateTimeOffset to);
}

/// <summary>What a turn changes, to be committed whole or not at all.</summary>
public sealed record TurnChanges
{
    /// <summary>Resources whose readings are replaced by those of <see cref="Readings"/> (none there = none left).</summary>
    public IReadOnlyList<ResourceKey> Replaced { get; init; } = [];

    /// <summary>The new readings of the replaced resources.</summary>
    public IReadOnlyList<Reading> Readings { get; init; } = [];

    /// <summary>The person's new facts; null when unchanged.</summary>
    public Person? Person { get; init; }

    /// <summary>Outcomes that are new, different or gone.</summary>
    public IReadOnlyList<OutcomeChange> Outcomes { get; init; } = [];
}

/// <summary>One changed outcome.</summary>
/// <param name="Identity">Identity of the outcome.</param>
/// <param name="Before">The stored one; null when new.</param>
/// <param name="Now">The new one; null when the anchor no longer calls.</param>
public sealed record OutcomeChange(Guid Identity, Outcome? Before, Outcome? Now);
