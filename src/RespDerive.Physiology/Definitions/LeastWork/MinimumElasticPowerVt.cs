using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tidal volume at which elastic work a minute is least.</summary>
/// <remarks>
/// VT = 2·VD, whatever the ventilation and the elastance: the least of E/2·VT²·VA/(VT − VD).
/// </remarks>
public sealed class MinimumElasticPowerVt : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minimum-elastic-power-vt", "VTE", "tidal volume of least elastic power", "mL", 10, 3000,
        Tolerance.Deviation(0, 0.15, "typical"), [MinimumWorkRate.DeadSpace], x => Of(x[MinimumWorkRate.DeadSpace]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Model of breathing rate";

    /// <inheritdoc/>
    public override string Summary => "Twice the dead space: the tidal volume at which elastic work a minute is least.";

    /// <inheritdoc/>
    public override string Equation => "VTE = 2·VD";

    /// <inheritdoc/>
    public override string Assumptions => "Constant dead space and elastance, resistance left out; alveolar ventilation kept.";

    /// <inheritdoc/>
    public override string Caution => "A model value, not a setting and not advice: never to be entered into a ventilator.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (200, 600);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Fabry B. 2024, preprint, abstract: elastic power is least at a tidal volume of twice the dead space"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Fabry 2024, abstract: least elastic power at twice the dead space", 300, 1e-9, ("VD", 0.15, "L")),
    ];

    /// <summary>Dead space in mL.</summary>
    public static double Of(double deadSpace) => 2 * deadSpace;
}
