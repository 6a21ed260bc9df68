namespace RespDerive.Physiology.Inputs;

/// <summary>Pressure of saturated water vapour (Antoine form).</summary>
public static class WaterVapour
{
    /// <summary>Pressure in mm[Hg] at a temperature in °C: exp(18.6686 − 4030.183/(t + 235)).</summary>
    /// <param name="celsius">0 to 42; within 0.07 mm[Hg] of IAPWS there, unchecked outside.</param>
    public static double PressureMmHg(double celsius) => Math.Exp(18.6686 - (4030.183 / (celsius + 235)));
}
