namespace RespDerive.Physiology.Inputs;

/// <summary>How far a reading of one kind may be from the truth, and where that is written.</summary>
/// <remarks>
/// Standard uncertainty (JCGM 100). A limit ±a without further knowledge is a rectangular distribution, u = a/√3.
/// <paramref name="Zero"/> is the part of the limit that is one offset of the transducer: readings of one device share it,
/// so that it cancels in differences.
/// </remarks>
/// <param name="Absolute">Absolute part, in the canonical unit of the kind.</param>
/// <param name="Relative">Part proportional to the reading.</param>
/// <param name="Rectangular">True when the figures are limits ±a, false when they are standard deviations.</param>
/// <param name="Source">Document the figures are from, or the words "own judgement".</param>
/// <param name="Zero">True when the absolute part is the zero offset of a transducer.</param>
public sealed record Tolerance(double Absolute, double Relative, bool Rectangular, string Source, bool Zero = false)
{
    private static readonly double Root3 = Math.Sqrt(3);

    /// <summary>Known exactly, or coded.</summary>
    public static readonly Tolerance None = new(0, 0, false, "exact");

    /// <summary>A limit ±(absolute + relative·value).</summary>
    public static Tolerance Limit(double absolute, double relative, string source, bool zero = false) => new(absolute, relative, true, source, zero);

    /// <summary>A standard deviation: the greater of the absolute and the relative figure.</summary>
    public static Tolerance Deviation(double absolute, double relative, string source) => new(absolute, relative, false, source);

    /// <summary>Standard uncertainty of a reading, all parts together.</summary>
    public double Standard(double value) => Rectangular
        ? (Absolute + (Relative * Math.Abs(value))) / Root3
        : Math.Max(Absolute, Relative * Math.Abs(value));

    /// <summary>Standard uncertainty without the shared zero offset.</summary>
    public double Independent(double value) => Zero ? Relative * Math.Abs(value) / Root3 : Standard(value);

    /// <summary>Standard uncertainty of the zero offset alone.</summary>
    public double Offset => Zero ? Absolute / Root3 : 0;
}
