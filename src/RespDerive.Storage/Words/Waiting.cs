namespace RespDerive.Storage;

/// <summary>Something to be read from a source.</summary>
/// <param name="Id">Its row.</param>
/// <param name="Source">The source.</param>
/// <param name="Target">Reference or query.</param>
/// <param name="Asked">How often it was asked for; asked again while under way, it is read again.</param>
/// <param name="Tries">Failed attempts.</param>
/// <param name="Since">When first asked for.</param>
/// <param name="Missing">How often in a row it was not found.</param>
/// <param name="MissingSince">When it was first not found, of those times; null when it never was.</param>
public sealed record Fetch(long Id, string Source, string Target, long Asked, int Tries, DateTimeOffset Since, int Missing, DateTimeOffset? MissingSince);

/// <summary>Something that becomes due at a time.</summary>
/// <param name="Purpose">What for.</param>
/// <param name="Key">Whom or what; unique within the purpose.</param>
/// <param name="At">When.</param>
public sealed record DueItem(string Purpose, string Key, DateTimeOffset At);
