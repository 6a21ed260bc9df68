namespace RespDerive.Sandbox.Patients.Lung;

/// <summary>
/// One compartment: P = V/C + R·flow + PEEP. Resistance may differ between inspiration and expiration,
/// as in airflow obstruction.
/// </summary>
/// <param name="Compliance">L/cm[H2O].</param>
/// <param name="InspiratoryResistance">cm[H2O].s/L.</param>
/// <param name="ExpiratoryResistance">cm[H2O].s/L.</param>
internal sealed record RespiratorySystem(double Compliance, double InspiratoryResistance, double ExpiratoryResistance)
{
    /// <summary>Seconds in which passive expiration reaches 63.2 % of its end.</summary>
    public double ExpiratoryTimeConstant => ExpiratoryResistance * Compliance;

    public double InspiratoryTimeConstant => InspiratoryResistance * Compliance;
}
