using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;

namespace RespDerive.Service.Operations;

/// <summary>A background loop: work, wait, again. A failed round is reported and tried again; it never ends the service.</summary>
internal abstract class Loop(TimeProvider time, ILogger logger) : BackgroundService
{
    private static readonly TimeSpan AfterFailure = TimeSpan.FromSeconds(2);
    private readonly SemaphoreSlim _hurry = new(0, 1);

    /// <summary>One round; the answer is how long to wait before the next.</summary>
    protected abstract Task<TimeSpan> RoundAsync(CancellationToken cancel);

    /// <summary>Starts the next round at once.</summary>
    public void Hurry()
    {
        try
        {
            _hurry.Release();
        }
        catch (SemaphoreFullException)
        {
            // Already asked for.
        }
    }

    public override void Dispose()
    {
        _hurry.Dispose();
        base.Dispose();
    }

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            TimeSpan wait;
            try
            {
                wait = await RoundAsync(stoppingToken);
            }
            catch (OperationCanceledException) when (stoppingToken.IsCancellationRequested)
            {
                return;
            }
            catch (Exception exception)
            {
                Trouble.Report(logger, exception, $"{GetType().Name} failed and goes on");
                wait = AfterFailure;
            }

            await WaitAsync(wait, stoppingToken);
        }
    }

    private async Task WaitAsync(TimeSpan wait, CancellationToken stop)
    {
        if (wait <= TimeSpan.Zero)
        {
            return;
        }

        using var either = CancellationTokenSource.CreateLinkedTokenSource(stop);
        var hurried = _hurry.WaitAsync(either.Token);
        await Task.WhenAny(hurried, Task.Delay(wait, time, either.Token));
        await either.CancelAsync();
        await ((Task)hurried).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
    }
}
