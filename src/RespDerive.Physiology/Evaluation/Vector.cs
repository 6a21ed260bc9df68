using System.Globalization;

namespace RespDerive.Physiology;

/// <summary>A value given by hand: a number with its UCUM unit (null = canonical), or a code.</summary>
/// <param name="Name">Key or symbol of the kind.</param>
/// <param name="Value">The number as typed; null for a code.</param>
/// <param name="Unit">UCUM unit of the number; null for the canonical one.</param>
/// <param name="Code">The code; null for a number.</param>
/// <param name="Transducer">Numbers with the same non-null mark share the zero offset of one transducer.</param>
public sealed record Given(string Name, decimal? Value, string? Unit, string? Code, string? Transducer = null)
{
    /// <summary>The value as it was typed.</summary>
    public string Typed => Code ?? (Unit is null or "1" ? Value!.Value.ToString(CultureInfo.InvariantCulture) : string.Create(CultureInfo.InvariantCulture, $"{Value} {Unit}"));

    /// <summary>A number with a unit.</summary>
    public static implicit operator Given((string Name, double Value, string Unit) given) => new(given.Name, (decimal)given.Value, given.Unit, null);

    /// <summary>A code.</summary>
    public static implicit operator Given((string Name, string Code) given) => new(given.Name, null, null, given.Code);
}

/// <summary>Where an expected value comes from.</summary>
public enum Evidence
{
    /// <summary>Printed in a publication.</summary>
    Published,

    /// <summary>A limiting case or identity anybody can check on paper.</summary>
    Limit,

    /// <summary>This code's own earlier output, pinned.</summary>
    Regression,
}

/// <summary>A worked example of a definition.</summary>
/// <param name="Evidence">Kind of source.</param>
/// <param name="Source">The publication, or the argument of the limiting case.</param>
/// <param name="Expected">Value in the canonical unit of the result.</param>
/// <param name="Within">Greatest allowed absolute difference.</param>
/// <param name="Inputs">What is given.</param>
public sealed record Vector(Evidence Evidence, string Source, double Expected, double Within, params IReadOnlyList<Given> Inputs);

/// <summary>A source.</summary>
/// <param name="Text">Authors, title or journal, year, locator.</param>
/// <param name="Doi">DOI without resolver; null when not known.</param>
public sealed record Citation(string Text, string? Doi = null);

/// <summary>A code of a standard terminology for a result.</summary>
/// <param name="System">Code system URI.</param>
/// <param name="Code">The code.</param>
/// <param name="Display">The terminology's own name of it.</param>
public sealed record StandardCode(string System, string Code, string Display)
{
    /// <summary>A LOINC code.</summary>
    public static StandardCode Loinc(string code, string display) => new("http://loinc.org", code, display);

    /// <summary>An ISO/IEEE 11073-10101 code.</summary>
    public static StandardCode Mdc(string code, string display) => new("urn:iso:std:iso:11073:10101", code, display);
}
