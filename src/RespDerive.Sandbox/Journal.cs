namespace RespDerive.Sandbox;

/// <summary>One thing that happened at the endpoint: a request, an entry of a Bundle, or a change of the server's own.</summary>
/// <param name="At">Server time.</param>
/// <param name="Method">HTTP method; entries of a Bundle have their own rows after the Bundle's.</param>
/// <param name="Path">Path and query below the base, as sent.</param>
/// <param name="Type">Resource type, when one was addressed.</param>
/// <param name="Id">Logical id, also of a resource just created.</param>
/// <param name="Version">Version read or written.</param>
/// <param name="Status">HTTP status; 0 when the connection was cut after the commit.</param>
public sealed record JournalEntry(DateTimeOffset At, string Method, string Path, string? Type, string? Id, int? Version, int Status);

/// <summary>What happened, in order; it only grows. Safe to read while the server runs.</summary>
public sealed class Journal
{
    private readonly Lock _gate = new();
    private readonly List<JournalEntry> _entries = [];

    /// <summary>A copy of all entries so far.</summary>
    public IReadOnlyList<JournalEntry> Entries
    {
        get { lock (_gate) { return [.. _entries]; } }
    }

    internal void Add(JournalEntry entry)
    {
        lock (_gate)
        {
            _entries.Add(entry);
        }
    }
}
