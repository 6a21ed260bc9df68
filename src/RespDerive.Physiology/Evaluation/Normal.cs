namespace RespDerive.Physiology;

/// <summary>The standard normal distribution.</summary>
internal static class Normal
{
    /// <summary>Probability below <paramref name="z"/>; Abramowitz and Stegun 1964, 26.2.17, absolute error under 7.5e-8. A number divided by no uncertainty gives ±∞.</summary>
    public static double Below(double z)
    {
        if (z < 0)
        {
            return 1 - Below(-z);
        }

        var t = 1 / (1 + (0.2316419 * z));
        var sum = t * (0.319381530 + (t * (-0.356563782 + (t * (1.781477937 + (t * (-1.821255978 + (t * 1.330274429))))))));
        return 1 - (Math.Exp(-z * z / 2) / Math.Sqrt(2 * Math.PI) * sum);
    }
}
