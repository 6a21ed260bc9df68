using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>What one resource version yields. A version that yields nothing still replaces the one before.</summary>
public sealed record ReadResult
{
    /// <summary>Readings, usable and refused.</summary>
    public IReadOnlyList<Reading> Readings { get; init; } = [];

    /// <summary>The person, from a Patient resource.</summary>
    public Person? Person { get; init; }

    /// <summary>References that would have said more and could not be found; worth fetching, then reading again.</summary>
    public IReadOnlyList<string> Unresolved { get; init; } = [];

    /// <summary>The source withdrew it: it leaves no trace.</summary>
    public bool Withdrawn { get; init; }

    /// <summary>It is one of our own results coming back.</summary>
    public bool Own { get; init; }

    /// <summary>Values that gave no reading, and why; for counting.</summary>
    public IReadOnlyList<IgnoredPart> Ignored { get; init; } = [];
}

/// <summary>A value that gave no reading.</summary>
/// <param name="Part">Empty for the resource's own value, else the component.</param>
/// <param name="Reason">One of <see cref="Refusals"/>.</param>
/// <param name="Key">What the code means, when it is known.</param>
public sealed record IgnoredPart(string Part, string Reason, string? Key);
