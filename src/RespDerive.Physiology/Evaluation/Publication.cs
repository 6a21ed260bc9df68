using System.Globalization;

namespace RespDerive.Physiology;

/// <summary>The one place where a computed number becomes the number that is published.</summary>
public static class Publication
{
    /// <summary>To decimal, nine places first, then the definition's decimals, half away from zero both times.</summary>
    /// <remarks>The first step removes the last bits of binary arithmetic, so that 60/0.30 is 200 and not 199.99999999999997.</remarks>
    /// <exception cref="OverflowException">The number does not fit a decimal; hard limits exclude it before.</exception>
    public static decimal Round(double value, int decimals) =>
        Math.Round(Math.Round((decimal)value, 9, MidpointRounding.AwayFromZero), decimals, MidpointRounding.AwayFromZero);

    /// <summary>Plain notation with the definition's decimals.</summary>
    public static string Text(decimal published, int decimals) =>
        published.ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
}
