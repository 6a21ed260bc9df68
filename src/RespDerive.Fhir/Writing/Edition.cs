namespace RespDerive.Fhir.Writing;

/// <summary>Status of a published result; the record's own history, not the patient's.</summary>
public enum EditionStatus
{
    /// <summary>An input is preliminary, or a charted companion may still be superseded.</summary>
    Preliminary,

    /// <summary>First settled state.</summary>
    Final,

    /// <summary>Differs from an earlier final.</summary>
    Amended,

    /// <summary>Differs from an earlier final because an input was corrected.</summary>
    Corrected,

    /// <summary>Retracted: the number is dropped, its evidence stays.</summary>
    EnteredInError,
}

/// <summary>One published state of a result. The same edition of the same outcome always renders to the same bytes.</summary>
public sealed record Edition
{
    /// <summary>Status.</summary>
    public required EditionStatus Status { get; init; }

    /// <summary>When this state was recorded; kept with it, so that a resend says the same.</summary>
    public required DateTimeOffset Recorded { get; init; }

    /// <summary>1 for the first state published, then rising.</summary>
    public int Revision { get; init; } = 1;

    /// <summary>The server's id of the Observation; null until it has been created.</summary>
    public string? ServerId { get; init; }

    /// <summary>The server's version we wrote last; null for the first edition.</summary>
    public string? PreviousVersion { get; init; }

    /// <summary>Withheld code that explains a retraction; null when the input itself was withdrawn or the anchor no longer calls.</summary>
    public string? Withheld { get; init; }

    /// <summary>Retracted because the server holds the same result twice; the other copy stands.</summary>
    public bool IsSecondCopy { get; init; }

    /// <summary>True for a settled state.</summary>
    public bool IsFinal => Status is EditionStatus.Final or EditionStatus.Amended or EditionStatus.Corrected;

    /// <summary>True for a retraction.</summary>
    public bool IsRetraction => Status == EditionStatus.EnteredInError;
}
