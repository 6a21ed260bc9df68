using System.Diagnostics.Metrics;
using RespDerive.Service.Operations;

namespace RespDerive.Service.Intake;

/// <summary>
/// When a resource that was there cannot be read any more. 410 says that it was deleted. 404 and 403 may as well mean a lost permission
/// or a restored backup, so they withdraw only after three reads over a day, while the patient's record can be read, and not for many at once.
/// </summary>
internal sealed class Disappearances
{
    /// <summary>Wait between two reads of a resource that cannot be found.</summary>
    public static readonly TimeSpan BetweenReads = TimeSpan.FromHours(12);

    private const int Reads = 3;
    private static readonly TimeSpan Span = TimeSpan.FromHours(24);
    private const int MostInAnHour = 20;
    private static readonly TimeSpan Hour = TimeSpan.FromHours(1);
    private static readonly Counter<long> Held = Telemetry.Meter.CreateCounter<long>("respderive.intake.withdrawals_held", "{resource}", "Withdrawals held back because too many resources vanished within an hour");
    private readonly Queue<DateTimeOffset> _recent = new();
    private readonly Lock _lock = new();

    /// <summary>True when a read that finds nothing is the last one needed.</summary>
    /// <param name="before">Reads in a row that found nothing before this one.</param>
    /// <param name="since">Time of the first of them.</param>
    /// <param name="now">Time of this one.</param>
    public static bool IsLast(int before, DateTimeOffset? since, DateTimeOffset now) => before + 1 >= Reads && now - since >= Span;

    /// <summary>Counts a withdrawal; false when more than twenty came within an hour, which looks like a fault of the source.</summary>
    public bool Allow(DateTimeOffset now)
    {
        lock (_lock)
        {
            while (_recent.TryPeek(out var first) && now - first > Hour)
            {
                _recent.Dequeue();
            }

            if (_recent.Count >= MostInAnHour)
            {
                Held.Add(1);
                return false;
            }

            _recent.Enqueue(now);
            return true;
        }
    }
}
