using System.Collections.Concurrent;
using Microsoft.Data.Sqlite;

namespace RespDerive.Storage;

/// <summary>A few read connections; each is used by one caller at a time.</summary>
internal sealed class Readers(string path) : IDisposable
{
    private const int Most = 8;

    private readonly ConcurrentBag<Session> _idle = [];
    private readonly SemaphoreSlim _free = new(Most);
    private volatile bool _closed;

    /// <summary>Waits for a connection and starts a snapshot on it.</summary>
    public Session Take()
    {
        _free.Wait();
        Session? session = null;
        try
        {
            session = _idle.TryTake(out var idle) ? idle : Session.Open(path, readOnly: true);
            session.Execute(Sql.BeginRead);
            return session;
        }
        catch
        {
            session?.Dispose();
            _free.Release();
            throw;
        }
    }

    /// <summary>Ends the snapshot.</summary>
    public void Return(Session session)
    {
        try
        {
            session.Execute(Sql.Rollback);
            _idle.Add(session);
        }
        catch (SqliteException)
        {
            session.Dispose();
        }
        finally
        {
            _free.Release();
        }

        if (_closed)
        {
            Dispose();
        }
    }

    /// <summary>One read in one snapshot.</summary>
    public T Read<T>(Func<Session, T> read)
    {
        var session = Take();
        try
        {
            return read(session);
        }
        finally
        {
            Return(session);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _closed = true;
        while (_idle.TryTake(out var session))
        {
            session.Dispose();
        }
    }
}
