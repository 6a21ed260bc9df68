using System.Globalization;
using RespDerive.Physiology;
using ScottPlot;

namespace RespDerive.Plots;

/// <summary>What is drawn. Each point is computed by the definition it shows; a withheld one is left out.</summary>
internal static class Drawings
{
    private const double AlveolarVentilation = 4.5;
    private const double DeadSpace = 0.15;

    public static readonly Picture AlveolarArterialDifference = new("aa-gradient", ["aa-gradient", "alveolar-po2"],
        "inspired oxygen fraction (PaCO2 40 mmHg, 760 mmHg, R 0.8)", "alveolar-arterial difference, mmHg", Alignment.UpperLeft,
        () => [.. new[] { 0.85, 0.6, 0.3 }.Select(ratio => new Line(string.Create(CultureInfo.InvariantCulture, $"arterial at {ratio} of alveolar"), Points(0.21, 1, 0.01, fraction =>
            Value("alveolar-po2", ("FiO2", fraction, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")) is { } alveolar
                ? Value("aa-gradient", ("PAO2", alveolar, "mm[Hg]"), ("PaO2", ratio * alveolar, "mm[Hg]")) : null)))]);

    public static readonly Picture Dissociation = new("so2-severinghaus", ["so2-severinghaus"],
        "oxygen partial pressure, mmHg (37 °C)", "oxygen saturation", Alignment.LowerRight,
        () => [.. new[] { 7.2, 7.4, 7.6 }.Select(ph => new Line(string.Create(CultureInfo.InvariantCulture, $"pH {ph}"), Points(2, 120, 2, tension =>
            Value("so2-severinghaus", ("PO2", tension, "mm[Hg]"), ("pH", ph, "[pH]"), ("temp", 37, "Cel")))))]);

    public static readonly Picture WorkOfBreathing = new("minimum-work-rate", ["minimum-work-rate", "work-elastic-per-breath", "work-resistive-per-breath"],
        "rate, /min (alveolar ventilation 4.5 L/min, dead space 0.15 L)", "work of breathing, J/min", Alignment.UpperRight,
        () => [Work("normal", 0.1, 3), Work("stiff", 0.04, 3), Work("obstructed", 0.1, 10)]);

    /// <summary>Work per minute over rate, with the rate of least work marked. Compliance in L/cm[H2O], resistance in cm[H2O].s/L.</summary>
    private static Line Work(string label, double compliance, double resistance)
    {
        double? Rate(double rate)
        {
            var tidal = Math.Round(DeadSpace + (AlveolarVentilation / rate), 6);
            var elastic = Value("work-elastic-per-breath", ("E", Math.Round(1 / compliance, 6), "cm[H2O]/L"), ("VT", tidal, "L"));
            var resistive = Value("work-resistive-per-breath", ("R", resistance, "cm[H2O].s/L"), ("RR", rate, "/min"), ("VT", tidal, "L"));
            return rate * (elastic + resistive);
        }

        var least = Value("minimum-work-rate", ("VA", AlveolarVentilation, "L/min"), ("VD", DeadSpace, "L"), ("C", compliance, "L/cm[H2O]"), ("R", resistance, "cm[H2O].s/L"));
        return new Line($"{label}: C {(1000 * compliance).ToString(CultureInfo.InvariantCulture)} mL/cmH2O, R {resistance.ToString(CultureInfo.InvariantCulture)} cmH2O·s/L", Points(5, 45, 0.5, Rate),
            least is { } at && Rate(Math.Round(at, 6)) is { } work ? (at, work) : null);
    }

    private static IReadOnlyList<(double X, double Y)> Points(double from, double to, double step, Func<double, double?> of)
    {
        var points = new List<(double X, double Y)>();
        for (var i = 0; from + (i * step) <= to + (step / 2); i++)
        {
            var x = Math.Round(from + (i * step), 6);
            if (of(x) is { } y)
            {
                points.Add((x, y));
            }
        }

        return points;
    }

    private static double? Value(string key, params Given[] given) =>
        ByHand.Compute(Catalogue.Shipped.Find(key)!, given).Computation is { Withheld: null } computed ? computed.Value : null;
}
