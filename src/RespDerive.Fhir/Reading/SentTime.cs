using System.Globalization;

namespace RespDerive.Fhir;

/// <summary>How much of a time was sent.</summary>
internal enum Precision
{
    /// <summary>A year, a month or a day.</summary>
    Date,

    /// <summary>A time of day, to the minute at least.</summary>
    Time,
}

/// <summary>A FHIR date, dateTime or instant, taken apart without assuming a zone.</summary>
/// <param name="Precision">Whether there is a time of day.</param>
/// <param name="Local">The clock time as written; the first moment of a date.</param>
/// <param name="Offset">The zone as written; null when none.</param>
internal readonly record struct SentTime(Precision Precision, DateTime Local, TimeSpan? Offset)
{
    private static readonly string[] Dates = ["yyyy", "yyyy-MM", "yyyy-MM-dd"];
    private static readonly string[] Times = ["yyyy-MM-dd'T'HH:mm", "yyyy-MM-dd'T'HH:mm:ss", "yyyy-MM-dd'T'HH:mm:ss.FFFFFFF"];

    /// <summary>Null when the text is no FHIR time.</summary>
    public static SentTime? Parse(string? text)
    {
        if (text is null)
        {
            return null;
        }

        if (!text.Contains('T', StringComparison.Ordinal))
        {
            return Exact(text, Dates) is { } date ? new(Precision.Date, date, null) : null;
        }

        var (clock, zone) = Split(text);
        TimeSpan? offset = null;
        if (zone.Length > 0)
        {
            offset = Zone(zone);
            if (offset is null)
            {
                return null;
            }
        }

        // FHIR allows a leap second; the clock of this library has none, so it is the second after :59.
        var leap = clock.Length >= 19 && clock.AsSpan(16, 3).SequenceEqual(":60");
        var local = Exact(Trim(leap ? string.Concat(clock.AsSpan(0, 17), "59", clock.AsSpan(19)) : clock), Times);
        return local is { } time && (!leap || time < DateTime.MaxValue.AddSeconds(-1)) ? new(Precision.Time, leap ? time.AddSeconds(1) : time, offset) : null;
    }

    /// <summary>A time with its zone; null when anything is missing.</summary>
    public static DateTimeOffset? Instant(string? text) =>
        Parse(text) is { Precision: Precision.Time, Offset: { } offset } sent ? sent.With(offset) : null;

    /// <summary>The moment, given the zone; clamped at the ends of the calendar.</summary>
    public DateTimeOffset With(TimeSpan offset) =>
        Local.Ticks - offset.Ticks is var ticks && ticks < 0 ? DateTimeOffset.MinValue
        : ticks > DateTime.MaxValue.Ticks ? DateTimeOffset.MaxValue
        : new(Local, offset);

    private static (string Clock, string Zone) Split(string text)
    {
        if (text.EndsWith('Z'))
        {
            return (text[..^1], "Z");
        }

        var sign = text.LastIndexOfAny(['+', '-']);
        return sign > text.IndexOf('T', StringComparison.Ordinal) ? (text[..sign], text[sign..]) : (text, "");
    }

    private static TimeSpan? Zone(string zone)
    {
        if (zone == "Z")
        {
            return TimeSpan.Zero;
        }

        return TimeSpan.TryParseExact(zone[1..], @"hh\:mm", CultureInfo.InvariantCulture, out var size) && size <= TimeSpan.FromHours(14)
            ? (zone[0] == '-' ? -size : size) : null;
    }

    /// <summary>Digits beyond 100 ns say nothing here and would not parse.</summary>
    private static string Trim(string clock) =>
        clock.IndexOf('.', StringComparison.Ordinal) is var dot and >= 0 && clock.Length > dot + 8 && clock.AsSpan(dot + 1).IndexOfAnyExceptInRange('0', '9') < 0
            ? clock[..(dot + 8)] : clock;

    private static DateTime? Exact(string text, string[] formats) =>
        DateTime.TryParseExact(text, formats, CultureInfo.InvariantCulture, DateTimeStyles.None, out var found) ? found : null;
}
