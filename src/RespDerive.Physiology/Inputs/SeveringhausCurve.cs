namespace RespDerive.Physiology.Inputs;

/// <summary>
/// The standard oxygen dissociation curve of human blood at pH 7.40 and 37 °C: Severinghaus JW, J Appl Physiol 1979;46:599, equation 1,
/// with its exact inverse (Ellis RK, J Appl Physiol 1989;67:902) and the shifts with temperature and pH (equations 3 and 4).
/// </summary>
/// <remarks>Tensions in mm[Hg], saturations as fractions. The equation misses the paper's own table 1 by up to 0.55 % saturation.</remarks>
public static class SeveringhausCurve
{
    /// <summary>Tension of half saturation on this curve, mm[Hg]: 26.86, not the nominal 26.6.</summary>
    public static double P50 => Tension(0.5);

    /// <summary>Saturation at a tension: 1 / (23400/(P³ + 150·P) + 1).</summary>
    public static double Saturation(double tension) => 1 / ((23400 / ((tension * tension * tension) + (150 * tension))) + 1);

    /// <summary>Tension at a saturation: the real root of P³ + 150·P = 23400·S/(1 − S).</summary>
    public static double Tension(double saturation)
    {
        var q = 11700 * saturation / (1 - saturation);
        var root = Math.Sqrt((q * q) + 125000);
        return Math.Cbrt(q + root) - Math.Cbrt(root - q);
    }

    /// <summary>The tension that would give the same saturation at pH 7.40 and 37 °C; both coefficients are taken at the tension given.</summary>
    public static double Standard(double tension, double ph, double celsius)
    {
        var perDegree = (0.058 / ((0.243 * Math.Pow(tension / 100, 3.88)) + 1)) + 0.013;
        var perPh = Math.Pow(tension / 26.6, 0.184) - 2.2;
        return tension * Math.Exp(-((celsius - 37) * perDegree) - ((ph - 7.4) * perPh));
    }
}
