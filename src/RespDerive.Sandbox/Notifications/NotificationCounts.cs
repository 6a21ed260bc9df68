namespace RespDerive.Sandbox.Notifications;

/// <summary>How many notifications were sent, and how many not.</summary>
public sealed class NotificationCounts
{
    private readonly Lock _gate = new();
    private TaskCompletionSource? _quiet;
    private int _pending;
    private int _delivered;
    private int _dropped;

    /// <summary>Accepted by the receiver (2xx).</summary>
    public int Delivered
    {
        get { lock (_gate) { return _delivered; } }
    }

    /// <summary>Given up after the last attempt, or lost by a fault.</summary>
    public int Dropped
    {
        get { lock (_gate) { return _dropped; } }
    }

    /// <summary>Completes when nothing waits for delivery.</summary>
    public Task QuietAsync(CancellationToken cancel = default)
    {
        lock (_gate)
        {
            return _pending == 0
                ? Task.CompletedTask
                : (_quiet ??= new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously)).Task.WaitAsync(cancel);
        }
    }

    internal void Queued()
    {
        lock (_gate)
        {
            _pending++;
        }
    }

    internal void Lost()
    {
        lock (_gate)
        {
            _dropped++;
        }
    }

    internal void Done(bool delivered)
    {
        lock (_gate)
        {
            _pending--;
            _ = delivered ? _delivered++ : _dropped++;
            if (_pending == 0)
            {
                _quiet?.SetResult();
                _quiet = null;
            }
        }
    }
}
