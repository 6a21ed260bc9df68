using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>Gates that values of carbon dioxide, acid and base, and diffusion share.</summary>
public static class CarbonDioxideGates
{
    /// <summary>Solubility and pK' as published together: CLSI C46, Zander, Siggaard-Andersen (0.230 mmol/L/kPa).</summary>
    private static readonly (double Alpha, double Pk)[] BicarbonateSets = [(0.0307, 6.105), (0.0304, 6.1), (0.230 * 0.133322, 6.1)];

    /// <summary>1/θ = slope·P + intercept: Guénard 2016, Forster 1987, Roughton and Forster 1957, Holland 1969.</summary>
    private static readonly (double Slope, double Intercept)[] ThetaSets = [(0.0062, 1.16), (0.0041, 1.3), (0.0058, 1.0), (0.0065, 1.08)];

    /// <summary>Expired gas escapes through the leak of a mask.</summary>
    public static readonly Gate NoMask = new(Withheld.Leak, "expired gas is lost in non-invasive ventilation", [Kinds.Support],
        x => x.Code(Kinds.Support) == "non-invasive ventilation");

    /// <summary>Double correction is the classic error.</summary>
    public static readonly Gate NotYetCorrected = new(Withheld.AlreadyCorrected, "the analyser already corrected the gas to the patient's temperature",
        [Kinds.TemperatureCorrected], x => x.Code(Kinds.TemperatureCorrected) == "true");

    /// <summary>Raised when nothing tells whether the gas is already corrected.</summary>
    public static readonly FlagRule CorrectionUnstated = new(Flags.CorrectionUnstated, [Kinds.TemperatureCorrected], x => !x.Has(Kinds.TemperatureCorrected));

    /// <summary>Range of the temperature corrections.</summary>
    public static readonly Gate TemperatureInRange = new(Withheld.TemperatureOutOfRange, "the temperature is below 25 or above 42 °C", [],
        x => x.Has(Kinds.BodyTemperature) && x[Kinds.BodyTemperature] is < 25 or > 42);

    /// <summary>Range of the base excess formulas.</summary>
    public static readonly Gate BaseExcessInRange = new(Withheld.InputInvalid, "pH is outside 6.8 to 7.8 or PaCO2 outside 10 to 150 mm[Hg]", [],
        x => (x.Has(Kinds.PhArterial) && x[Kinds.PhArterial] is < 6.8 or > 7.8) || (x.Has(Kinds.PaCO2) && x[Kinds.PaCO2] is < 10 or > 150));

    /// <summary>Constants of one set belong together.</summary>
    public static readonly Gate OneBicarbonateSet = new(Withheld.ConstantsMixed, "solubility and pK' are not of one published set", [],
        x => x.Has(Kinds.CO2Solubility) && x.Has(Kinds.CO2Pk) && !IsAnySet(x));

    /// <summary>The CLSI base excess is defined on the CLSI bicarbonate.</summary>
    public static readonly Gate ClsiBicarbonate = new(Withheld.ConstantsMixed, "solubility and pK' are not those of the CLSI set", [],
        x => x.Has(Kinds.CO2Solubility) && x.Has(Kinds.CO2Pk) && !IsSet(x, BicarbonateSets[0]));

    /// <summary>Slope and intercept of one publication belong together.</summary>
    public static readonly Gate OneThetaSet = new(Withheld.ConstantsMixed, "slope and intercept of 1/θ are not of one published set", [],
        x => x.Has(Kinds.ThetaSlope) && x.Has(Kinds.ThetaIntercept) && !IsAnyTheta(x));

    private static bool IsAnySet(Roots x)
    {
        var found = false;
        foreach (var set in BicarbonateSets)
        {
            found |= IsSet(x, set);
        }

        return found;
    }

    private static bool IsAnyTheta(Roots x)
    {
        var found = false;
        foreach (var (slope, intercept) in ThetaSets)
        {
            found |= Math.Abs(x[Kinds.ThetaSlope] - slope) < 1e-4 && Math.Abs(x[Kinds.ThetaIntercept] - intercept) < 0.01;
        }

        return found;
    }

    private static bool IsSet(Roots x, (double Alpha, double Pk) set) =>
        Math.Abs(x[Kinds.CO2Solubility] - set.Alpha) < 2.5e-5 && Math.Abs(x[Kinds.CO2Pk] - set.Pk) < 0.002;
}
