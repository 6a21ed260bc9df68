namespace RespDerive.Sandbox;

/// <summary>
/// Faults that a test switches on while the server runs. Each "next" call adds a budget that requests use up.
/// Members may be called from any thread.
/// </summary>
public sealed class Faults
{
    private readonly Lock _gate = new();
    private readonly List<Planned> _failures = [];
    private TimeSpan _delay;
    private TimeSpan _staleness;
    private int _lost;
    private int _races;
    private int _dropped;
    private int _duplicated;

    /// <summary>Every request waits this long before it is served.</summary>
    public TimeSpan Delay
    {
        get { lock (_gate) { return _delay; } }
        set { lock (_gate) { _delay = value; } }
    }

    /// <summary>Searches see the store as it was this long ago; reads by id and conditions of writes are not affected.</summary>
    public TimeSpan SearchStaleness
    {
        get { lock (_gate) { return _staleness; } }
        set { lock (_gate) { _staleness = value; } }
    }

    /// <summary>The next requests (of one HTTP method, when given) are answered with this server error and do nothing.</summary>
    public void FailNext(int count, int status = 503, string? method = null) => Plan(new Planned(count, status, method, null));

    /// <summary>The next requests are answered 429 with <c>Retry-After</c> and do nothing.</summary>
    public void ThrottleNext(int count, TimeSpan retryAfter, string? method = null) => Plan(new Planned(count, 429, method, retryAfter));

    /// <summary>The next writes are committed, then the connection is cut before the answer.</summary>
    public void LoseNextResponses(int count) => Set(ref _lost, count);

    /// <summary>The next conditional creates do not see what is there already, as when two race: duplicates arise.</summary>
    public void RaceNextConditionalCreates(int count) => Set(ref _races, count);

    /// <summary>The next notifications are silently lost.</summary>
    public void DropNextNotifications(int count) => Set(ref _dropped, count);

    /// <summary>The next notifications are delivered twice.</summary>
    public void DuplicateNextNotifications(int count) => Set(ref _duplicated, count);

    /// <summary>Switches everything off.</summary>
    public void Clear()
    {
        lock (_gate)
        {
            _failures.Clear();
            _delay = _staleness = TimeSpan.Zero;
            _lost = _races = _dropped = _duplicated = 0;
        }
    }

    internal (int Status, TimeSpan? RetryAfter)? TakeFailure(string method)
    {
        lock (_gate)
        {
            var planned = _failures.Find(f => f.Method is null || f.Method.Equals(method, StringComparison.OrdinalIgnoreCase));
            if (planned is null)
            {
                return null;
            }
            if (--planned.Left <= 0)
            {
                _failures.Remove(planned);
            }
            return (planned.Status, planned.RetryAfter);
        }
    }

    internal bool TakeLostResponse() => Take(ref _lost);

    internal bool TakeRace() => Take(ref _races);

    internal bool TakeDroppedNotification() => Take(ref _dropped);

    internal bool TakeDuplicatedNotification() => Take(ref _duplicated);

    private void Plan(Planned planned)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(planned.Left);
        lock (_gate)
        {
            _failures.Add(planned);
        }
    }

    private void Set(ref int budget, int count)
    {
        lock (_gate)
        {
            budget = count;
        }
    }

    private bool Take(ref int budget)
    {
        lock (_gate)
        {
            if (budget <= 0)
            {
                return false;
            }
            budget--;
            return true;
        }
    }

    private sealed class Planned(int count, int status, string? method, TimeSpan? retryAfter)
    {
        public int Left { get; set; } = count;
        public int Status => status;
        public string? Method => method;
        public TimeSpan? RetryAfter => retryAfter;
    }
}
