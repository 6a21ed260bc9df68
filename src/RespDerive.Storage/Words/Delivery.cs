using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>A result whose wanted edition is not yet at the server, or that is parked.</summary>
public sealed record Delivery
{
    /// <summary>Identity of the outcome.</summary>
    public required Guid Identity { get; init; }

    /// <summary>Number of the patient.</summary>
    public required long Patient { get; init; }

    /// <summary>The current outcome; null when the anchor no longer calls.</summary>
    public required Outcome? Current { get; init; }

    /// <summary>The last outcome that had a value or code (the current one when it has); null when there never was one.</summary>
    public required Outcome? LastValued { get; init; }

    /// <summary>Rises with every change; pass it back when marking.</summary>
    public required long Wanted { get; init; }

    /// <summary>The wanted counter that was delivered last; 0 = none.</summary>
    public required long Delivered { get; init; }

    /// <summary>Editions at the server.</summary>
    public required long Revisions { get; init; }

    /// <summary>True when an edition with status final, amended or corrected is at the server.</summary>
    public required bool FinalSeen { get; init; }

    /// <summary>True when the last edition at the server is a retraction.</summary>
    public bool Retracted { get; init; }

    /// <summary>Logical id at the server; null when none was created.</summary>
    public string? ServerId { get; init; }

    /// <summary>The last version that we wrote.</summary>
    public string? ServerVersion { get; init; }

    /// <summary>Failed attempts since the last success.</summary>
    public required int Tries { get; init; }

    /// <summary>Not before this time.</summary>
    public required DateTimeOffset Due { get; init; }

    /// <summary>Since when it waits.</summary>
    public required DateTimeOffset Since { get; init; }

    /// <summary>When the wanted edition came to be.</summary>
    public required DateTimeOffset Recorded { get; init; }

    /// <summary>The edition that was last sent and not confirmed, so that the server may hold it; null when none is.</summary>
    public Attempt? Attempt { get; init; }

    /// <summary>Code of the refusal for good; null when not parked.</summary>
    public string? Parked { get; init; }

    /// <summary>What the server said.</summary>
    public string? ParkedText { get; init; }

    /// <summary>A person has withdrawn the result at the server: nothing more is ever sent.</summary>
    public bool WithdrawnByPerson { get; init; }

    /// <summary>True while the wanted edition is not at the server.</summary>
    public bool IsPending => Wanted != Delivered;
}

/// <summary>An edition under way to the server.</summary>
/// <param name="Wanted">Its counter.</param>
/// <param name="Digest">Digest of its content, by which it is known again.</param>
/// <param name="Evidence">What testifies to it, as sent; opaque here.</param>
public sealed record Attempt(long Wanted, string Digest, byte[] Evidence);

/// <summary>Withheld outcomes of one definition in a row with one code.</summary>
/// <param name="Patient">Number of the patient.</param>
/// <param name="Definition">Key of the definition.</param>
/// <param name="Code">Withheld code.</param>
/// <param name="From">First event time.</param>
/// <param name="To">Last event time.</param>
/// <param name="Count">How many.</param>
public sealed record WithheldRun(long Patient, string Definition, string Code, DateTimeOffset From, DateTimeOffset To, int Count);

/// <summary>Which outcomes to list; null = any.</summary>
public sealed record OutcomeFilter
{
    /// <summary>Number of the patient.</summary>
    public long? Patient { get; init; }

    /// <summary>Key of the definition.</summary>
    public string? Definition { get; init; }

    /// <summary>Withheld code.</summary>
    public string? Code { get; init; }

    /// <summary>True: only withheld ones; false: only those with a value.</summary>
    public bool? Withheld { get; init; }

    /// <summary>Earliest event time, inclusive.</summary>
    public DateTimeOffset? From { get; init; }

    /// <summary>Latest event time, inclusive.</summary>
    public DateTimeOffset? To { get; init; }

    /// <summary>At most this many, the latest event times.</summary>
    public int Limit { get; init; } = 1000;
}
