namespace RespDerive.Sandbox.Patients;

/// <summary>
/// Sensors and analysers with errors inside their stated limits. What belongs to a sensor (offset, gain) is drawn
/// once per patient and day; the rest per reading. Limits: ISO 80601-2-12 (volume, pressure) and ISO 80601-2-55
/// (oxygen), both from memory; analyser deviations and the rest are assumptions of this simulation.
/// </summary>
internal sealed class Instruments(Dice dice)
{
    private readonly double _pressureOffset = dice.Within(2);
    private readonly double _volume = dice.Within(1);
    private readonly double _oxygenSensor = dice.Within(1);
    private readonly double _blender = dice.Within(0.03);
    private readonly double _oximeterBias = dice.Normal(0.014);

    /// <summary>±(2 cm[H2O] + 4 %): the 2 is one transducer's zero for the day.</summary>
    public double Pressure(double actual) => actual + _pressureOffset + dice.Within(0.04 * actual);

    /// <summary>±(4 mL + 15 %), L.</summary>
    public double Volume(double actual) => actual + (_volume * (0.004 + (0.15 * actual)));

    /// <summary>The same flow sensor, summed over a minute, L/min.</summary>
    public double MinuteVolume(double actual, double rate) => rate * Volume(actual / rate);

    /// <summary>±1 /min.</summary>
    public double Rate(double actual) => actual + dice.Within(1);

    /// <summary>What the blender really delivers when set to this fraction, ±0.03.</summary>
    public double Delivered(double set) => Math.Clamp(set + _blender, 0.2095, 1);

    /// <summary>±(2.5 vol% + 2.5 % of level).</summary>
    public double FiO2(double delivered) => Math.Clamp(delivered + (_oxygenSensor * (0.025 + (0.025 * delivered))), 0.2095, 1);

    /// <summary>Root mean square error about 1.5 %.</summary>
    public double SpO2(double actual) => Math.Min(1, actual + _oximeterBias + dice.Normal(0.005));

    /// <summary>5 % standard deviation.</summary>
    public double PO2(double actual) => actual * (1 + dice.Normal(0.05));

    /// <summary>2.5 % standard deviation, at least 1 mm[Hg].</summary>
    public double PCO2(double actual) => actual + dice.Normal(Math.Max(1, 0.025 * actual));

    /// <summary>0.01 standard deviation.</summary>
    public double Ph(double actual) => actual + dice.Normal(0.01);

    /// <summary>0.6 % standard deviation.</summary>
    public double SaO2(double actual) => Math.Min(1, actual + dice.Normal(0.006));
}
