using System.Globalization;
using Hl7.Fhir.Model;
using RespDerive.Physiology;

namespace RespDerive.Fhir.Writing;

/// <summary>Numbers as FHIR decimals: plain notation, and no more digits than they are worth.</summary>
internal static class Numbers
{
    /// <summary>The published number with exactly the definition's decimals: 7 with one decimal is written 7.0.</summary>
    public static decimal Published(decimal value, int decimals) =>
        decimal.Parse(Publication.Text(value, decimals), CultureInfo.InvariantCulture);

    /// <summary>Two significant digits, the second one written also when it is 0 (JCGM 100:2008, 7.2.6).</summary>
    public static decimal Uncertainty(double value) => Significant(value, 2);

    /// <summary>A value for people to read: six significant digits, no trailing zeros.</summary>
    public static decimal Shown(double value) => Plain(Significant(value, 6));

    /// <summary>A value to recompute from: all that a double holds for certain (15 digits), no trailing zeros.</summary>
    public static decimal Exact(double value) => Plain((decimal)value);

    /// <summary>A quantity in a UCUM unit.</summary>
    public static Quantity Quantity(decimal value, string unit) => new() { Value = value, Unit = Readable(unit), System = Vocabulary.Ucum, Code = unit };

    /// <summary>The unit as people write it; the code beside it stays UCUM.</summary>
    private static string Readable(string ucum) => ucum switch
    {
        "a" => "years",
        "1" => "ratio", // "0.5 1" could be read as 0.51
        _ => ucum.Replace("[Hg]", "Hg", StringComparison.Ordinal).Replace("[H2O]", "H2O", StringComparison.Ordinal),
    };

    private static decimal Significant(double value, int digits)
    {
        if (value == 0)
        {
            return 0m;
        }

        var places = Places(value);
        if (places < 0)
        {
            var step = (decimal)Math.Pow(10, -places);
            return Rounded((decimal)value / step, 0) * step;
        }

        // Rounding may carry into the next decade: 0.0996 has two digits as 0.10.
        var rounded = Rounded((decimal)value, places);
        return rounded == 0 ? rounded : Rounded(rounded, Math.Clamp(Places((double)rounded), 0, places));

        int Places(double number) => Math.Min(digits - 1 - (int)Math.Floor(Math.Log10(Math.Abs(number))), 28);
    }

    /// <summary>Half away from zero, written with all its places.</summary>
    private static decimal Rounded(decimal value, int places) => Published(Math.Round(value, places, MidpointRounding.AwayFromZero), places);

    /// <summary>Without trailing zeros and without exponent.</summary>
    private static decimal Plain(decimal value) => value / 1.0000000000000000000000000000m;
}
