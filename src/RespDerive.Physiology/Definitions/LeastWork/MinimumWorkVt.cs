using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tidal volume at the breath rate of least work.</summary>
/// <remarks>
/// VT = VA/f + VD at the rate of least work: what keeps the alveolar ventilation.
/// </remarks>
public sealed class MinimumWorkVt : Definition
{
    private static readonly Slot Rate = new(MinimumWorkRate.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minimum-work-vt", "VTW", "tidal volume at the breath rate of least work", "mL", 20, 3000,
        Tolerance.Deviation(0, 0.13, "typical"), [MinimumWorkRate.Ventilation, MinimumWorkRate.DeadSpace, Rate],
        x => Of(x[MinimumWorkRate.Ventilation], x[MinimumWorkRate.DeadSpace], x[Rate]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Model of breathing rate";

    /// <inheritdoc/>
    public override string Summary => "Tidal volume that keeps the alveolar ventilation at the breath rate of least work.";

    /// <inheritdoc/>
    public override string Equation => "VTW = 1000·VA/fW + VD";

    /// <inheritdoc/>
    public override string Assumptions => "As for the breath rate of least work.";

    /// <inheritdoc/>
    public override string Caution => "A model value, not a setting and not advice: never to be entered into a ventilator.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (200, 900);

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
        new("Otis AB, Fenn WO, Rahn H. Mechanics of breathing in man. J Appl Physiol 1950;2:592 (criterion; closed form derived from it)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "where f·R·C = 1/π² the derivative vanishes at VT = 3·VD", 450, 0.02, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 40.5285, "mL/cm[H2O]"), ("R", 10, "cm[H2O].s/L")),
        new(Evidence.Limit, "at a rate of VA/VD, that of no resistance, it is twice the dead space", 300, 1e-9, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("fW", 30, "/min")),
    ];

    /// <summary>Ventilation in L/min, dead space in mL, rate per minute.</summary>
    public static double Of(double ventilation, double deadSpace, double rate) => (1000 * ventilation / rate) + deadSpace;
}
