namespace RespDerive.Storage;

/// <summary>One caller's part of a transaction.</summary>
internal abstract class Work(long bytes)
{
    /// <summary>About how much it writes.</summary>
    public long Bytes => bytes;

    /// <summary>Why it alone was rolled back.</summary>
    public Exception? Problem { get; set; }

    /// <summary>Writes.</summary>
    public abstract void Run(Session session);

    /// <summary>Tells the caller that the transaction is durable, or what was wrong with this item.</summary>
    public abstract void Complete();

    /// <summary>Tells the caller that nothing was written.</summary>
    public abstract void Fail(Exception problem);
}

/// <inheritdoc/>
internal sealed class Work<T>(Func<Session, T> action, long bytes) : Work(bytes)
{
    private readonly TaskCompletionSource<T> _done = new(TaskCreationOptions.RunContinuationsAsynchronously);
    private T? _result;

    /// <summary>Completes after COMMIT.</summary>
    public Task<T> Task => _done.Task;

    /// <inheritdoc/>
    public override void Run(Session session) => _result = action(session);

    /// <inheritdoc/>
    public override void Complete()
    {
        if (Problem is { } problem)
        {
            _done.TrySetException(problem);
        }
        else
        {
            _done.TrySetResult(_result!);
        }
    }

    /// <inheritdoc/>
    public override void Fail(Exception problem) => _done.TrySetException(problem);
}
