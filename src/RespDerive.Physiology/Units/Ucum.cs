using System.Collections.Frozen;

namespace RespDerive.Physiology.Units;

/// <summary>
/// The closed table of UCUM units this service accepts, with exact decimal factors.
/// A unit outside the table is refused; nothing is guessed from a display string.
/// </summary>
/// <remarks>
/// Factors are those of the UCUM specification, table of derived units: m[Hg] = 133.322 kPa, m[H2O] = 9.80665 kPa,
/// [in_i] = 2.54 cm, [lb_av] = 0.45359237 kg. UCUM annotations ({…}) carry no meaning and are dropped.
/// </remarks>
public static class Ucum
{
    private sealed record Unit(string Dimension, decimal Factor, decimal Offset = 0m);

    private static readonly FrozenDictionary<string, Unit> Table = new Dictionary<string, Unit>(StringComparer.Ordinal)
    {
        // pressure, in kPa
        ["kPa"] = new("pressure", 1m),
        ["Pa"] = new("pressure", 0.001m),
        ["hPa"] = new("pressure", 0.1m),
        ["mbar"] = new("pressure", 0.1m),
        ["bar"] = new("pressure", 100m),
        ["mm[Hg]"] = new("pressure", 0.133322m),
        ["cm[H2O]"] = new("pressure", 0.0980665m),
        ["mm[H2O]"] = new("pressure", 0.00980665m),
        // volume, in L
        ["L"] = new("volume", 1m),
        ["l"] = new("volume", 1m),
        ["dL"] = new("volume", 0.1m),
        ["dl"] = new("volume", 0.1m),
        ["cL"] = new("volume", 0.01m),
        ["mL"] = new("volume", 0.001m),
        ["ml"] = new("volume", 0.001m),
        ["cm3"] = new("volume", 0.001m),
        // flow, in L/min
        ["L/min"] = new("flow", 1m),
        ["l/min"] = new("flow", 1m),
        ["mL/min"] = new("flow", 0.001m),
        ["ml/min"] = new("flow", 0.001m),
        ["L/s"] = new("flow", 60m),
        ["l/s"] = new("flow", 60m),
        ["mL/s"] = new("flow", 0.06m),
        ["ml/s"] = new("flow", 0.06m),
        // rate, in /min
        ["/min"] = new("rate", 1m),
        ["1/min"] = new("rate", 1m),
        ["min-1"] = new("rate", 1m),
        ["/s"] = new("rate", 60m),
        ["Hz"] = new("rate", 60m),
        // fraction
        ["1"] = new("fraction", 1m),
        ["%"] = new("fraction", 0.01m),
        // time, in s
        ["s"] = new("time", 1m),
        ["ms"] = new("time", 0.001m),
        ["min"] = new("time", 60m),
        ["h"] = new("time", 3600m),
        ["d"] = new("time", 86400m),
        ["a"] = new("time", 31557600m),
        // length, in cm
        ["cm"] = new("length", 1m),
        ["m"] = new("length", 100m),
        ["mm"] = new("length", 0.1m),
        ["km"] = new("length", 100000m),
        ["[in_i]"] = new("length", 2.54m),
        ["[ft_i]"] = new("length", 30.48m),
        // mass, in kg
        ["kg"] = new("mass", 1m),
        ["g"] = new("mass", 0.001m),
        ["[lb_av]"] = new("mass", 0.45359237m),
        // compliance, in L/kPa
        ["L/kPa"] = new("compliance", 1m),
        ["mL/kPa"] = new("compliance", 0.001m),
        ["mL/cm[H2O]"] = new("compliance", 0.001m / 0.0980665m),
        ["L/cm[H2O]"] = new("compliance", 1m / 0.0980665m),
        ["mL/mbar"] = new("compliance", 0.01m),
        ["mL/hPa"] = new("compliance", 0.01m),
        // elastance, in kPa/L
        ["kPa/L"] = new("elastance", 1m),
        ["cm[H2O]/L"] = new("elastance", 0.0980665m),
        ["cm[H2O]/mL"] = new("elastance", 98.0665m),
        ["mbar/L"] = new("elastance", 0.1m),
        // resistance, in kPa.s/L
        ["kPa.s/L"] = new("resistance", 1m),
        ["cm[H2O].s/L"] = new("resistance", 0.0980665m),
        ["cm[H2O]/L/s"] = new("resistance", 0.0980665m),
        ["mbar.s/L"] = new("resistance", 0.1m),
        // volume per body mass, in mL/kg
        ["mL/kg"] = new("volume per mass", 1m),
        ["L/kg"] = new("volume per mass", 1000m),
        // pressure over pressure, in mm[Hg]/cm[H2O]
        ["mm[Hg]/cm[H2O]"] = new("pressure over airway pressure", 1m),
        ["kPa/cm[H2O]"] = new("pressure over airway pressure", 1m / 0.133322m),
        // diffusing capacity, in mL/min/mm[Hg]; a mole is 22.4 L of gas (STPD), the figure of the lung function standards
        ["mL/min/mm[Hg]"] = new("diffusing capacity", 1m),
        ["mL/min/kPa"] = new("diffusing capacity", 0.133322m),
        ["mmol/min/kPa"] = new("diffusing capacity", 22.4m * 0.133322m),
        ["mmol/(min.kPa)"] = new("diffusing capacity", 22.4m * 0.133322m),
        // diffusing capacity per volume, in mL/min/mm[Hg]/L
        ["mL/min/mm[Hg]/L"] = new("diffusing capacity per volume", 1m),
        ["mL/min/kPa/L"] = new("diffusing capacity per volume", 0.133322m),
        ["mmol/min/kPa/L"] = new("diffusing capacity per volume", 22.4m * 0.133322m),
        ["mmol/(min.kPa.L)"] = new("diffusing capacity per volume", 22.4m * 0.133322m),
        // uptake resistance of blood, in min.kPa, and of the capillary bed, in min.kPa/mL
        ["min.mm[Hg]"] = new("uptake resistance of blood", 0.133322m),
        ["min.kPa"] = new("uptake resistance of blood", 1m),
        ["min.mm[Hg]/mL"] = new("uptake resistance", 0.133322m),
        ["min.kPa/mL"] = new("uptake resistance", 1m),
        // gas tension per production and ventilation, in kPa.L/mL
        ["mm[Hg].L/mL"] = new("tension per production and ventilation", 0.133322m),
        ["kPa.L/mL"] = new("tension per production and ventilation", 1m),
        // pH
        ["[pH]"] = new("pH", 1m),
        // mass concentration, in g/L
        ["g/L"] = new("mass concentration", 1m),
        ["g/dL"] = new("mass concentration", 10m),
        ["mg/mL"] = new("mass concentration", 1m),
        // gas in blood, in mL/dL
        ["mL/dL"] = new("gas content", 1m),
        ["mL/L"] = new("gas content", 0.1m),
        // gas bound by mass, in mL/g
        ["mL/g"] = new("gas capacity", 1m),
        // solubility of a gas, in mL/dL/mm[Hg]
        ["mL/dL/mm[Hg]"] = new("solubility", 1m),
        ["mL/L/mm[Hg]"] = new("solubility", 0.1m),
        ["mL/dL/kPa"] = new("solubility", 0.133322m),
        ["mL/L/kPa"] = new("solubility", 0.0133322m),
        // volume per body mass and pressure, in mL/kPa/kg
        ["mL/kPa/kg"] = new("compliance per mass", 1m),
        ["mL/cm[H2O]/kg"] = new("compliance per mass", 1m / 0.0980665m),
        ["mL/mbar/kg"] = new("compliance per mass", 10m),
        // rate per volume, in /min/L
        ["/min/L"] = new("rate per volume", 1m),
        ["/(min.L)"] = new("rate per volume", 1m),
        ["/min/mL"] = new("rate per volume", 1000m),
        // work, in J
        ["J"] = new("work", 1m),
        ["mJ"] = new("work", 0.001m),
        ["L.cm[H2O]"] = new("work", 0.0980665m),
        // work per time, in J/min
        ["J/min"] = new("power", 1m),
        ["W"] = new("power", 60m),
        ["mW"] = new("power", 0.06m),
        // work per volume and pressure: a pure number for the formulas that print their own
        ["J/(L.cm[H2O])"] = new("work factor", 1m),
        // amount concentration, in mmol/L; an equivalent is a mole of charges, and what is measured here has one charge
        ["mmol/L"] = new("amount concentration", 1m),
        ["mol/L"] = new("amount concentration", 1000m),
        ["umol/L"] = new("amount concentration", 0.001m),
        ["meq/L"] = new("amount concentration", 1m),
        // molar solubility of a gas, in mmol/L/kPa
        ["mmol/L/mm[Hg]"] = new("molar solubility", 1m / 0.133322m),
        ["mmol/L/kPa"] = new("molar solubility", 1m),
        // temperature, in K
        ["K"] = new("temperature", 1m),
        ["Cel"] = new("temperature", 1m, 273.15m),
        ["[degF]"] = new("temperature", 5m / 9m, 273.15m - (32m * 5m / 9m)),
    }.ToFrozenDictionary(StringComparer.Ordinal);

    /// <summary>Every accepted unit code.</summary>
    internal static IEnumerable<string> Accepted => Table.Keys.Order(StringComparer.Ordinal);

    /// <summary>All accepted unit codes of the same dimension as <paramref name="unit"/>.</summary>
    public static IEnumerable<string> Alike(string unit) =>
        Table.TryGetValue(unit, out var known)
            ? Table.Where(entry => entry.Value.Dimension == known.Dimension).Select(entry => entry.Key).Order(StringComparer.Ordinal)
            : [];

    /// <summary>Converts a value between two accepted units.</summary>
    /// <param name="value">The number as sent.</param>
    /// <param name="from">UCUM code of the number; annotations in braces are ignored.</param>
    /// <param name="to">UCUM code wanted.</param>
    /// <param name="converted">The number in <paramref name="to"/>, exact to 28 digits.</param>
    /// <returns>False when a unit is not in the table, the dimensions differ, or the number overflows.</returns>
    public static bool TryConvert(decimal value, string from, string to, out decimal converted)
    {
        converted = 0m;
        if (!Table.TryGetValue(WithoutAnnotations(from), out var source) || !Table.TryGetValue(WithoutAnnotations(to), out var target)
            || source.Dimension != target.Dimension)
        {
            return false;
        }

        if (source == target)
        {
            converted = value;
            return true;
        }

        try
        {
            converted = ((value * source.Factor) + source.Offset - target.Offset) / target.Factor;
            return true;
        }
        catch (OverflowException)
        {
            return false;
        }
    }

    private static string WithoutAnnotations(string unit)
    {
        if (!unit.Contains('{', StringComparison.Ordinal))
        {
            return unit;
        }

        var kept = new System.Text.StringBuilder(unit.Length);
        var depth = 0;
        foreach (var c in unit)
        {
            depth += c == '{' ? 1 : 0;
            if (depth == 0)
            {
                kept.Append(c);
            }

            depth -= c == '}' ? 1 : 0;
        }

        return kept.Length == 0 ? "1" : kept.ToString();
    }
}
