namespace RespDerive.Physiology.Inputs;

/// <summary>Pressure of the standard atmosphere below 11 km (ISO 2533:1975; US Standard Atmosphere 1976).</summary>
public static class StandardAtmosphere
{
    /// <summary>Pressure in mm[Hg] at an altitude in metres: 760·(1 − 2.25577e-5·h)^5.25588.</summary>
    /// <param name="metres">−500 to 11 000; the formula does not hold outside.</param>
    public static double PressureMmHg(double metres) => 760 * Math.Pow(1 - (2.25577e-5 * metres), 5.25588);
}
