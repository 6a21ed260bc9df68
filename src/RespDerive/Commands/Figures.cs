using System.Globalization;

namespace RespDerive.Commands;

/// <summary>Numbers as people read them.</summary>
internal static class Figures
{
    /// <summary>Up to six significant figures, without exponent or trailing zeros.</summary>
    public static string Plain(double value) => double.IsInfinity(value) || Math.Abs(value) > 1e15
        ? "any"
        : Math.Round((decimal)value, Decimals(value, 6), MidpointRounding.AwayFromZero).ToString("0.############", CultureInfo.InvariantCulture);

    /// <summary>An uncertainty: two significant figures (JCGM 100, 7.2.6).</summary>
    public static string TwoFigures(double value) =>
        Math.Round((decimal)value, Decimals(value, 2), MidpointRounding.AwayFromZero).ToString("F" + Decimals(value, 2).ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);

    public static string Percent(double fraction) => fraction is > 0 and < 0.005 ? "< 1 %" : string.Create(CultureInfo.InvariantCulture, $"{100 * fraction:F0} %");

    /// <summary>The unit with a space before it; nothing for a bare number.</summary>
    public static string Unit(string? unit) => unit is null or "1" ? "" : " " + unit;

    private static int Decimals(double value, int figures) =>
        value == 0 ? 0 : Math.Clamp(figures - 1 - (int)Math.Floor(Math.Log10(Math.Abs(value))), 0, 12);
}
