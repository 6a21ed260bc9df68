using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>What a patient's turn starts from.</summary>
public sealed record TurnInput
{
    /// <summary>Source of the patient.</summary>
    public required string Source { get; init; }

    /// <summary>Reference of the patient.</summary>
    public required string Patient { get; init; }

    /// <summary>Number to commit the turn under.</summary>
    public required long Turn { get; init; }

    /// <summary>Mark up to which this turn reads; 0 when nothing is open.</summary>
    public required long UpTo { get; init; }

    /// <summary>Winning versions to be read, in order of opening; also withdrawn ones.</summary>
    public required IReadOnlyList<ResourceBody> Resources { get; init; }

    /// <summary>Resources that now belong to another patient: their readings leave this one.</summary>
    public required IReadOnlyList<ResourceKey> Left { get; init; }

    /// <summary>True when more is open than was taken.</summary>
    public bool More { get; init; }
}
