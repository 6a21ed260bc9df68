namespace RespDerive.Fhir.Server;

/// <summary>What became of a write: data, not an exception, since every one of these is expected.</summary>
public abstract record ServerAnswer
{
    private ServerAnswer()
    {
    }

    /// <summary>The server has it.</summary>
    /// <param name="Id">The server's id.</param>
    /// <param name="Version">The server's version; null when it told none.</param>
    /// <param name="Existed">A conditional create found it already there and wrote nothing.</param>
    public sealed record Delivered(string Id, string? Version, bool Existed = false) : ServerAnswer;

    /// <summary>Try again later.</summary>
    /// <param name="After">How long the server asked to wait; null when it did not say.</param>
    /// <param name="MayBeWritten">True when the server may have carried it out all the same: look it up by identifier before sending again.</param>
    public sealed record Retry(TimeSpan? After, bool MayBeWritten) : ServerAnswer;

    /// <summary>The server's state is not the one expected: another version, or more than one match.</summary>
    public sealed record Conflict : ServerAnswer;

    /// <summary>The resource was deleted at the server.</summary>
    public sealed record Gone : ServerAnswer;

    /// <summary>Refused for good; a person must look.</summary>
    /// <param name="Code">The OperationOutcome's issue code, else <c>http-</c> and the status, else a word of ours.</param>
    /// <param name="Text">What was wrong where, free of patient data: status, issue code and element path, never the server's diagnostics.</param>
    public sealed record Parked(string Code, string Text) : ServerAnswer;

    /// <summary>The server said yes, but what it holds now is not known: look it up by identifier.</summary>
    public sealed record Unknown(string Why) : ServerAnswer;
}

/// <summary>What became of a transaction. An entry of a 200 may have failed all the same, so each has its own answer.</summary>
/// <param name="Whole">Delivered (the first entry's) when every entry is; else the first entry's answer that is not.</param>
/// <param name="Entries">In the order sent; empty when the server gave no answer entry by entry.</param>
public sealed record TransactionAnswer(ServerAnswer Whole, IReadOnlyList<ServerAnswer> Entries);

/// <summary>What a read brought.</summary>
/// <param name="Status">HTTP status; 0 when no answer came, or the reference was not ours to follow.</param>
/// <param name="Body">The bytes as sent.</param>
/// <param name="ETag">Version from the ETag, without quotes and W/; null when absent.</param>
/// <param name="Failure">Null, or <c>network</c>, <c>foreign-reference</c>.</param>
/// <param name="After">How long the server asked to wait.</param>
public sealed record ReadAnswer(int Status, byte[] Body, string? ETag, string? Failure = null, TimeSpan? After = null)
{
    /// <summary>True when the resource came.</summary>
    public bool Found => Status == 200;

    /// <summary>True when asking again later makes sense.</summary>
    public bool Transient => Failure == "network" || DeliveryVerdict.IsTransient(Status);
}

/// <summary>A page of a search.</summary>
/// <param name="Entries">Matches and included resources; OperationOutcomes of the server are left out.</param>
/// <param name="Self">The search the server says it did; null when it does not say.</param>
/// <param name="HasNext">True when another page follows.</param>
public sealed record SearchPage(IReadOnlyList<RawEntry> Entries, string? Self, bool HasNext);

/// <summary>One entry of a page, unparsed: one bad entry must not sink the page.</summary>
public sealed record RawEntry(byte[] Resource, string? FullUrl, string? Mode);

/// <summary>A search could not be carried to its end. Thrown, because half a result must never be taken for all of it.</summary>
public sealed class SearchFailedException(ServerAnswer answer) : Exception($"The search was not carried to its end: {answer switch
{
    ServerAnswer.Parked parked => parked.Code,
    _ => answer.GetType().Name,
}}.")
{
    /// <summary>Retry or Parked.</summary>
    public ServerAnswer Answer => answer;
}

/// <summary>What a server says it can do; a claim to be tested, not a fact.</summary>
/// <param name="FhirVersion">Such as 4.0.1; null when not said.</param>
/// <param name="Transaction">Takes transactions.</param>
/// <param name="ConditionalCreate">Conditional create of Observation.</param>
/// <param name="UpdateCreate">PUT with our id creates Observation and Provenance.</param>
/// <param name="Software">Name and version of the server software.</param>
public sealed record Capability(string? FhirVersion, bool Transaction, bool ConditionalCreate, bool UpdateCreate, string? Software)
{
    /// <summary>True for R4.</summary>
    public bool IsR4 => FhirVersion?.StartsWith("4.0", StringComparison.Ordinal) == true;
}
