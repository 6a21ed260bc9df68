using System.Globalization;
using System.Text.RegularExpressions;

namespace RespDerive.Sandbox.Search;

/// <summary>
/// The interval [<c>From</c>, <c>To</c>) that a FHIR date, dateTime or instant stands for by its own precision
/// (R4 search, "date": a value of day precision is the whole day). Without a zone the server reads UTC.
/// </summary>
internal readonly partial record struct DateRange(DateTimeOffset From, DateTimeOffset To)
{
    public static DateRange? TryParse(string? text)
    {
        var match = text is null ? Match.Empty : Form().Match(text);
        if (!match.Success)
        {
            return null;
        }
        int Part(string name, int absent) =>
            match.Groups[name] is { Success: true } g ? int.Parse(g.ValueSpan, CultureInfo.InvariantCulture) : absent;
        try
        {
            var offset = match.Groups["zone"].Value is { Length: > 1 } zone
                ? TimeSpan.ParseExact(zone[1..], @"hh\:mm", CultureInfo.InvariantCulture) * (zone[0] == '-' ? -1 : 1)
                : TimeSpan.Zero;
            var from = new DateTimeOffset(Part("year", 1), Part("month", 1), Part("day", 1), Part("hour", 0), Part("minute", 0), Part("second", 0), offset);
            if (match.Groups["fraction"] is { Success: true } f)
            {
                var digits = Math.Min(f.Length, 7);
                var tick = (long)Math.Pow(10, 7 - digits);
                from = from.AddTicks(long.Parse(f.ValueSpan[..digits], CultureInfo.InvariantCulture) * tick);
                return new DateRange(from, from.AddTicks(tick));
            }
            var to = match.Groups["second"].Success ? from.AddSeconds(1)
                : match.Groups["minute"].Success ? from.AddMinutes(1)
                : match.Groups["day"].Success ? from.AddDays(1)
                : match.Groups["month"].Success ? from.AddMonths(1)
                : from.AddYears(1);
            return new DateRange(from, to);
        }
        catch (ArgumentOutOfRangeException)
        {
            return null;
        }
        catch (FormatException)
        {
            return null;
        }
    }

    /// <summary>A Period; a missing end is open.</summary>
    public static DateRange? OfPeriod(string? start, string? end)
    {
        var (from, to) = (TryParse(start), TryParse(end));
        return from is null && to is null ? null : new DateRange(from?.From ?? DateTimeOffset.MinValue, to?.To ?? DateTimeOffset.MaxValue);
    }

    /// <summary>Does this (a resource's value) satisfy the prefix against the search value? R4 search, "Prefixes".</summary>
    public bool Satisfies(string prefix, DateRange wanted) => prefix switch
    {
        "eq" => Within(wanted),
        "ne" => !Within(wanted),
        "gt" => To > wanted.To,
        "lt" => From < wanted.From,
        "ge" => To > wanted.To || Within(wanted),
        "le" => From < wanted.From || Within(wanted),
        "sa" => From >= wanted.To,
        "eb" => To <= wanted.From,
        _ => false,
    };

    private bool Within(DateRange wanted) => wanted.From <= From && To <= wanted.To;

    [GeneratedRegex(@"^(?<year>\d{4})(-(?<month>\d\d)(-(?<day>\d\d)(T(?<hour>\d\d):(?<minute>\d\d)(:(?<second>\d\d)(\.(?<fraction>\d+))?)?(?<zone>Z|[+-]\d\d:\d\d)?)?)?)?$", RegexOptions.ExplicitCapture)]
    private static partial Regex Form();
}
