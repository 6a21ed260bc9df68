namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>Asks for references or queries to be read; asking again while one waits or is under way is counted, not lost.</summary>
    public Task<int> AddFetchesAsync(string source, IReadOnlyList<string> targets, DateTimeOffset now)
    {
        ArgumentNullException.ThrowIfNull(targets);
        return _writer.RunAsync(session => targets.Sum(target => session.Execute(Sql.AddFetch, source, target, now.UtcTicks)));
    }

    /// <summary>What is to be read now, the longest due first.</summary>
    public IReadOnlyList<Fetch> DueFetches(DateTimeOffset now, int limit) => _readers.Read(session => session.All(Sql.DueFetches,
        row => new Fetch(row.GetInt64(0), row.GetString(1), row.GetString(2), row.GetInt64(3), row.GetInt32(4), Columns.Time(row.GetInt64(5)), row.GetInt32(6),
            Columns.OptionalNumber(row, 7) is { } ticks ? Columns.Time(ticks) : null),
        now.UtcTicks, limit));

    /// <summary>It was read. False when it was asked for again meanwhile: it is due once more.</summary>
    public Task<bool> FetchDoneAsync(Fetch fetch)
    {
        ArgumentNullException.ThrowIfNull(fetch);
        return _writer.RunAsync(session =>
        {
            var done = session.Execute(Sql.FetchDone, fetch.Id, fetch.Asked) == 1;
            if (!done)
            {
                session.Execute(Sql.FetchAgain, fetch.Id);
            }

            return done;
        });
    }

    /// <summary>To be tried again; the answer did not say that it is missing, so those that did count no more.</summary>
    public Task<bool> FetchRetryAsync(long id, int tries, DateTimeOffset due) =>
        _writer.RunAsync(session => session.Execute(Sql.FetchRetry, id, tries, due.UtcTicks) == 1);

    /// <summary>The source did not find it: counted, and to be read again.</summary>
    public Task<bool> FetchMissingAsync(long id, DateTimeOffset now, DateTimeOffset due) =>
        _writer.RunAsync(session => session.Execute(Sql.FetchMissing, id, now.UtcTicks, due.UtcTicks) == 1);

    /// <summary>How many references and queries wait to be read.</summary>
    public long CountFetches() => _readers.Read(session => session.Number(Sql.CountFetches) ?? 0);

    /// <summary>Value of a cursor; null when it was never set.</summary>
    public string? Cursor(string name) => _readers.Read(session => session.One(Sql.Cursor, row => row.GetString(0), name));

    /// <summary>Moves a cursor by itself; with resources, use <see cref="AppendAsync"/>.</summary>
    public Task<bool> SetCursorAsync(Cursor cursor)
    {
        ArgumentNullException.ThrowIfNull(cursor);
        return _writer.RunAsync(session => session.Execute(Sql.SetCursor, cursor.Name, cursor.Value) == 1);
    }
}
