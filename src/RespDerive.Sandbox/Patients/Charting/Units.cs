using System.Globalization;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>In which units one bed's systems report, as hospitals differ.</summary>
internal sealed record Units(string Gas, string AirwayPressure, bool FractionAsOne, bool VolumeInLitres, bool HeightInMetres = false)
{
    private const double KilopascalPerMmHg = 0.133322387415;
    public const double MillibarPerCmH2O = 0.980665;

    /// <summary>A gas tension given in mm[Hg].</summary>
    public JsonObject Tension(double value) => Gas == "kPa" ? Quantity(value * KilopascalPerMmHg, 2, "kPa") : Quantity(value, 1, "mm[Hg]", "mmHg");

    /// <summary>An airway pressure given in cm[H2O].</summary>
    public JsonObject Pressure(double value) =>
        AirwayPressure == "mbar" ? Quantity(value * MillibarPerCmH2O, 1, "mbar") : Quantity(value, 1, "cm[H2O]", "cmH2O");

    public JsonObject Fraction(double value) => FractionAsOne ? Quantity(value, 2, "1") : Quantity(value * 100, 0, "%");

    /// <summary>A volume given in L.</summary>
    public JsonObject Volume(double value) => VolumeInLitres ? Quantity(value, 3, "L") : Quantity(value * 1000, 0, "mL");

    /// <summary>A flow given in L/s.</summary>
    public static JsonObject Flow(double value) => Quantity(value * 60, 0, "L/min");

    /// <summary>A height given in cm.</summary>
    public JsonObject Height(double value) => HeightInMetres ? Quantity(value / 100, 3, "m") : Quantity(value, 1, "cm");

    /// <summary>A UCUM quantity with a fixed number of decimals, as instruments print it.</summary>
    public static JsonObject Quantity(double value, int decimals, string code, string? unit = null) => new()
    {
        // A decimal keeps its trailing zeros: 7.40 is written as 7.40.
        ["value"] = decimal.Parse(value.ToString($"F{decimals}", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture),
        ["unit"] = unit ?? code,
        ["system"] = "http://unitsofmeasure.org",
        ["code"] = code,
    };
}
