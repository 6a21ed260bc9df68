using System.Globalization;

namespace RespDerive.Timeline;

/// <summary>Age from a FHIR birth date, which may be a year or a month only.</summary>
internal static class Ages
{
    private const int Adult = 18;

    /// <summary>Least age in whole years at a time, and whether it is certain on which side of 18 it lies.</summary>
    public static (double Years, bool Certain) At(string? birthDate, DateTimeOffset at)
    {
        if (birthDate is null || Bounds(birthDate) is not var (first, last))
        {
            return (double.NaN, false);
        }

        var day = DateOnly.FromDateTime(at.UtcDateTime);
        var (most, least) = (Years(first, day), Years(last, day));
        return least < 0 ? (double.NaN, false) : (least, most >= Adult == least >= Adult);
    }

    private static (DateOnly First, DateOnly Last)? Bounds(string text)
    {
        if (DateOnly.TryParseExact(text, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out var day))
        {
            return (day, day);
        }

        if (DateOnly.TryParseExact(text, "yyyy-MM", CultureInfo.InvariantCulture, DateTimeStyles.None, out var month))
        {
            return (month, month.AddMonths(1).AddDays(-1));
        }

        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var year) && year is >= 1850 and <= 9998
            ? (new DateOnly(year, 1, 1), new DateOnly(year, 12, 31))
            : null;
    }

    private static int Years(DateOnly birth, DateOnly day) =>
        day.Year - birth.Year - ((day.Month, day.Day).CompareTo((birth.Month, birth.Day)) < 0 ? 1 : 0);
}
