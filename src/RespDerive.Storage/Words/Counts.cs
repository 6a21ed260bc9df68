namespace RespDerive.Storage;

/// <summary>Totals of one store.</summary>
public sealed record Counts
{
    /// <summary>Resource versions received, without repeats.</summary>
    public required long Received { get; init; }

    /// <summary>Repeats.</summary>
    public required long Repeats { get; init; }

    /// <summary>Wins of a lower version number with a later time.</summary>
    public required long VersionResets { get; init; }

    /// <summary>Readings on the timelines.</summary>
    public required long Readings { get; init; }

    /// <summary>Current outcomes with a value or code.</summary>
    public required long Results { get; init; }

    /// <summary>Changes of a value to another.</summary>
    public required long Revisions { get; init; }

    /// <summary>Changes of a value to none.</summary>
    public required long Retractions { get; init; }

    /// <summary>Current outcomes without a value.</summary>
    public required long Withheld { get; init; }

    /// <summary>Editions that the server has taken.</summary>
    public required long Delivered { get; init; }

    /// <summary>Parked deliveries.</summary>
    public required long Refused { get; init; }

    /// <summary>Deliveries still to be made, without the parked ones.</summary>
    public required long Pending { get; init; }
}
