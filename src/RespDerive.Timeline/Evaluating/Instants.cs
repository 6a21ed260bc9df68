namespace RespDerive.Timeline;

/// <summary>Arithmetic of instants that stops at the ends of time instead of throwing.</summary>
internal static class Instants
{
    private static readonly TimeSpan Quarter = TimeSpan.FromMinutes(15);

    public static DateTimeOffset Plus(this DateTimeOffset time, TimeSpan span)
    {
        var ticks = (Int128)time.UtcTicks + span.Ticks;
        return ticks <= 0 ? DateTimeOffset.MinValue
            : ticks >= DateTimeOffset.MaxValue.UtcTicks ? DateTimeOffset.MaxValue
            : new DateTimeOffset((long)ticks, TimeSpan.Zero);
    }

    public static DateTimeOffset Minus(this DateTimeOffset time, TimeSpan span) => time.Plus(span == TimeSpan.MaxValue ? TimeSpan.MinValue : -span);

    /// <summary>Adds spans, saturating.</summary>
    public static TimeSpan And(this TimeSpan a, TimeSpan b) =>
        (Int128)a.Ticks + b.Ticks >= TimeSpan.MaxValue.Ticks ? TimeSpan.MaxValue : a + b;

    /// <summary>Start of the UTC quarter of an hour.</summary>
    public static DateTimeOffset QuarterStart(this DateTimeOffset time) => new(time.UtcTicks - (time.UtcTicks % Quarter.Ticks), TimeSpan.Zero);

    /// <summary>Last tick of the UTC quarter of an hour.</summary>
    public static DateTimeOffset QuarterEnd(this DateTimeOffset time) => time.QuarterStart().Plus(Quarter - TimeSpan.FromTicks(1));
}
