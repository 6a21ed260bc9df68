using System.Threading.Channels;
using Microsoft.Data.Sqlite;

namespace RespDerive.Storage;

/// <summary>
/// The one writer: takes what waits, runs it in one transaction, and tells the callers after COMMIT has returned.
/// One item's conflict fails that item alone; a failed write or commit fails the batch and stops the writer for good,
/// because after a failed flush a repeated one may succeed without having written.
/// </summary>
internal sealed class Writer : IAsyncDisposable
{
    private const int MostItems = 500;
    private const long MostBytes = 64L << 20;

    private readonly Session _session;
    private readonly Channel<Work> _waiting = Channel.CreateBounded<Work>(new BoundedChannelOptions(2048) { SingleReader = true });
    private readonly TaskCompletionSource<StoreException> _failed = new(TaskCreationOptions.RunContinuationsAsynchronously);
    private readonly Task _loop;
    private volatile StoreException? _failure;

    public Writer(Session session)
    {
        _session = session;
        _loop = Task.Run(RunAsync);
    }

    /// <summary>Completes when the writer has failed.</summary>
    public Task<StoreException> WhenFailed => _failed.Task;

    /// <summary>Why the writer has stopped; null while it works.</summary>
    public StoreException? Failure => _failure;

    /// <summary>Runs an action in the next transaction; completes when that is durable.</summary>
    /// <param name="action">What to write; may be rolled back alone.</param>
    /// <param name="bytes">About how much it writes.</param>
    public async Task<T> RunAsync<T>(Func<Session, T> action, long bytes = 0)
    {
        var work = new Work<T>(action, bytes);
        if (Failure is { } failure)
        {
            throw Refusal(failure);
        }

        try
        {
            await _waiting.Writer.WriteAsync(work);
        }
        catch (ChannelClosedException)
        {
            throw Failure is { } late ? Refusal(late) : new StoreException(StoreException.Closed, "the store is closed");
        }

        return await work.Task;
    }

    /// <summary>Writes what waits, then stops.</summary>
    public async ValueTask DisposeAsync()
    {
        _waiting.Writer.TryComplete();
        await _loop;
        _session.Dispose();
    }

    private async Task RunAsync()
    {
        var batch = new List<Work>(MostItems);
        while (await _waiting.Reader.WaitToReadAsync())
        {
            var bytes = 0L;
            while (batch.Count < MostItems && bytes < MostBytes && _waiting.Reader.TryRead(out var work))
            {
                batch.Add(work);
                bytes += work.Bytes;
            }

            Write(batch);
            batch.Clear();
        }
    }

    private void Write(List<Work> batch)
    {
        if (Failure is { } earlier)
        {
            FailAll(batch, Refusal(earlier));
            return;
        }

        try
        {
            _session.Execute(Sql.Begin);
        }
        catch (SqliteException problem) when (problem.SqliteErrorCode is SQLitePCL.raw.SQLITE_BUSY or SQLitePCL.raw.SQLITE_LOCKED)
        {
            FailAll(batch, new StoreException(StoreException.Busy, "another process holds the store", problem));
            return;
        }
        catch (Exception problem)
        {
            Stop(batch, problem);
            return;
        }

        try
        {
            foreach (var work in batch)
            {
                RunAlone(work);
            }

            _session.Execute(Sql.Commit);
        }
        catch (Exception problem)
        {
            Stop(batch, problem);
            return;
        }

        batch.ForEach(work => work.Complete());
    }

    private void RunAlone(Work work)
    {
        _session.Execute(Sql.Savepoint);
        try
        {
            work.Run(_session);
        }
        catch (Exception problem) when (problem is not SqliteException sqlite || IsOfItem(sqlite.SqliteErrorCode))
        {
            _session.Execute(Sql.RollbackTo);
            work.Problem = problem;
        }

        _session.Execute(Sql.Release);
    }

    // Everything else says that the file, the disk or the memory is in trouble.
    private static bool IsOfItem(int code) =>
        code is SQLitePCL.raw.SQLITE_CONSTRAINT or SQLitePCL.raw.SQLITE_TOOBIG or SQLitePCL.raw.SQLITE_MISMATCH or SQLitePCL.raw.SQLITE_ERROR;

    private void Stop(List<Work> batch, Exception problem)
    {
        var failure = new StoreException(StoreException.Failed, $"a write failed and the store has stopped: {problem.Message}", problem);
        _failure = failure;
        try
        {
            _session.Execute(Sql.Rollback);
        }
        catch (SqliteException)
        {
            // SQLite has often rolled back by itself already; either way nothing of the batch remains.
        }

        _waiting.Writer.TryComplete();
        FailAll(batch, failure);
        _failed.TrySetResult(failure);
    }

    private static StoreException Refusal(StoreException failure) => new(StoreException.Failed, failure.Message, failure.InnerException);

    private static void FailAll(List<Work> batch, StoreException problem) => batch.ForEach(work => work.Fail(problem));
}
