using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>One patient's timeline, outcomes and the resources around them, all as of one moment. Holds a connection until disposed.</summary>
public sealed class PatientHistory : IPatientHistory, IDisposable
{
    // readings this close before the last one may be copies of it
    private static readonly TimeSpan CopySpan = TimeSpan.FromMinutes(2);

    private readonly Readers _readers;
    private readonly Records _records;
    private readonly long _patient;
    private Session? _session;

    internal PatientHistory(Readers readers, Records records, long patient)
    {
        (_readers, _records, _patient) = (readers, records, patient);
        _session = readers.Take();
        try
        {
            Person = Open.One(Sql.Person, row => _records.Person(row.GetFieldValue<byte[]>(0)), patient);
        }
        catch
        {
            Dispose();
            throw;
        }
    }

    /// <inheritdoc/>
    public Person? Person { get; }

    private Session Open => _session ?? throw new ObjectDisposedException(nameof(PatientHistory));

    /// <inheritdoc/>
    public IReadOnlyList<Reading> Readings(IReadOnlyList<KindRange> ranges)
    {
        ArgumentNullException.ThrowIfNull(ranges);
        var found = new Dictionary<long, Reading>();
        foreach (var range in ranges)
        {
            if (range.Back > TimeSpan.Zero && LastBefore(range) is { } last)
            {
                Collect(found, range.Kind.Key, last - CopySpan.Ticks, last);
            }

            Collect(found, range.Kind.Key, range.From.UtcTicks, range.To.UtcTicks);
        }

        return [.. found.Values];
    }

    /// <inheritdoc/>
    public IReadOnlyList<Reading> ReadingsOf(ResourceKey resource)
    {
        ArgumentNullException.ThrowIfNull(resource);
        return Open.One<long?>(Sql.FindResource, row => row.GetInt64(0), resource.Source, resource.Type, resource.Id) is { } id
            ? [.. Open.All(Sql.ReadingsOfResource, row => (Kind: row.GetString(0), Body: row.GetFieldValue<byte[]>(1)), _patient, id)
                .Where(row => _records.Knows(row.Kind)).Select(row => _records.Reading(row.Body))]
            : [];
    }

    /// <inheritdoc/>
    public IReadOnlyList<Outcome> Outcomes(string definition, DateTimeOffset from, DateTimeOffset to) =>
        Open.All(Sql.OutcomesBetween, row => _records.Outcome(row.GetFieldValue<byte[]>(0)), _patient, definition, from.UtcTicks, to.UtcTicks);

    /// <summary>The winning version of a resource by its reference or another name, also when it is gone; null when none has come in.</summary>
    public ResourceBody? Find(string source, string reference) =>
        Open.One(Sql.FindBody, Columns.Body, source, reference) ?? Open.One(Sql.FindNamed, Columns.Body, source, reference);

    /// <summary>Winning versions, not gone, of the Observations and DiagnosticReports that refer to a resource.</summary>
    public IReadOnlyList<ResourceBody> PanelsOf(string source, string reference) => Open.All(Sql.Panels, Columns.Body, source, reference);

    /// <summary>Ends the snapshot.</summary>
    public void Dispose()
    {
        if (Interlocked.Exchange(ref _session, null) is { } session)
        {
            _readers.Return(session);
        }
    }

    private long? LastBefore(KindRange range) =>
        Open.Number(Sql.LastBefore, _patient, range.Kind.Key, range.From.UtcTicks, range.From.UtcTicks - range.Back.Ticks);

    private void Collect(Dictionary<long, Reading> found, string kind, long from, long to)
    {
        foreach (var (id, body) in Open.All(Sql.ReadingsBetween, row => (row.GetInt64(0), row.GetFieldValue<byte[]>(1)), _patient, kind, from, to))
        {
            if (!found.ContainsKey(id))
            {
                found.Add(id, _records.Reading(body));
            }
        }
    }
}
