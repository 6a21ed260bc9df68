using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Breath rate at which breathing needs the least force for a given alveolar ventilation.</summary>
/// <remarks>
/// f = ((VA/VD) / (2π·RC)²)^⅓, RC in min: the rate at which the amplitude of a sinusoidal driving pressure is least while VA is kept.
/// </remarks>
public sealed class MinimumForceRate : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minimum-force-rate", "fF", "breath rate of least force", "/min", 3, 90,
        Tolerance.Deviation(0, 0.13, "typical"), [MinimumWorkRate.Ventilation, MinimumWorkRate.DeadSpace, MinimumWorkRate.Resistance, MinimumWorkRate.Compliance],
        x => Of(x[MinimumWorkRate.Ventilation], x[MinimumWorkRate.DeadSpace], x[MinimumWorkRate.Resistance], x[MinimumWorkRate.Compliance]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Model of breathing rate";

    /// <inheritdoc/>
    public override string Summary => "Breath rate at which the amplitude of the driving pressure is least for a given alveolar ventilation.";

    /// <inheritdoc/>
    public override string Equation => "fF = ((VA/VD) / (2π·RC)²)^(1/3), RC = R·C/60000 in min, VA/VD in /min";

    /// <inheritdoc/>
    public override string Assumptions => "Sinusoidal pressure and flow, linear resistance and compliance, constant dead space. Time constant 0.05 to 3 s. Runs away where resistance is low.";

    /// <inheritdoc/>
    public override string Caution =>
        "A model value, not a setting and not advice: never to be entered into a ventilator. Where resistance is low it lies far "
        + "above the rates people breathe at.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (8, 35);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => MinimumWorkRate.ModelSymbols;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.InputInvalid, "the time constant R·C is outside 0.05 to 3 s", [], MinimumWorkRate.OutOfRange, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 20, "mL/cm[H2O]"), ("R", 1, "cm[H2O].s/L")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Mead J. Control of respiratory frequency. J Appl Physiol 1960;15:325 (criterion, from memory; closed form derived from it)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "where 2π·f·R·C = √2 the derivative vanishes at VT = 3·VD: 4.5 L/min, 0.15 L, f = VA/(2·VD) = 15", 15, 0.0005, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 90.0316, "mL/cm[H2O]"), ("R", 10, "cm[H2O].s/L")),
    ];

    /// <summary>Ventilation in L/min, dead space in mL, resistance in cm[H2O].s/L, compliance in mL/cm[H2O].</summary>
    public static double Of(double ventilation, double deadSpace, double resistance, double compliance)
    {
        var angle = 2 * Math.PI * resistance * compliance / 60_000;
        return Math.Cbrt(1000 * ventilation / deadSpace / (angle * angle));
    }
}
