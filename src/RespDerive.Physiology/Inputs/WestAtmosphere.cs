namespace RespDerive.Physiology.Inputs;

/// <summary>Barometric pressure at mountain sites (West JB. Prediction of barometric pressures at high altitude. J Appl Physiol 1996;81:1850; from memory).</summary>
/// <remarks>
/// Fits measured pressures on mountains between the tropics and the middle latitudes better than the standard atmosphere,
/// which reads about 12 mm[Hg] low at 3640 m. A barometer on site beats both.
/// </remarks>
public static class WestAtmosphere
{
    /// <summary>Pressure in mm[Hg] at an altitude in metres: exp(6.63268 − 0.1112·h − 0.00149·h²), h in km.</summary>
    /// <param name="metres">0 to 9000; the fit does not hold outside.</param>
    public static double PressureMmHg(double metres)
    {
        var h = metres / 1000;
        return Math.Exp(6.63268 - (0.1112 * h) - (0.00149 * h * h));
    }
}
