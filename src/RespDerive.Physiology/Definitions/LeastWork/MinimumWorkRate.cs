using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Breath rate at which breathing costs the least work for a given alveolar ventilation.</summary>
/// <remarks>
/// f = (√(1 + 4π²·RC·VA/VD) − 1) / (2π²·RC), RC in min: the rate at which elastic plus resistive work a minute is least while VA is kept,
/// with sinusoidal flow. Without resistance it is VA/VD, at a tidal volume of twice the dead space. Evaluated as 2·(VA/VD) / (√(…) + 1), which is
/// the same and loses no digits where RC is small.
/// </remarks>
public sealed class MinimumWorkRate : Definition
{
    /// <summary>Alveolar ventilation that is kept.</summary>
    internal static readonly Slot Ventilation = new(Kinds.AlveolarVentilationToKeep, new Pairing.ByHand());

    /// <summary>Dead space of a breath.</summary>
    internal static readonly Slot DeadSpace = new(Kinds.DeadSpaceVolume, new Pairing.ByHand());

    /// <summary>Resistance of the model.</summary>
    internal static readonly Slot Resistance = new(AirwayResistance.Value, new Pairing.ByHand());

    /// <summary>Compliance of the model.</summary>
    internal static readonly Slot Compliance = new(StaticCompliance.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("minimum-work-rate", "fW", "breath rate of least work", "/min", 3, 90,
        Tolerance.Deviation(0, 0.13, "typical"), [Ventilation, DeadSpace, Resistance, Compliance],
        x => Of(x[Ventilation], x[DeadSpace], x[Resistance], x[Compliance]));

    /// <summary>VA, VD, R and C as they are called here.</summary>
    internal static IReadOnlyDictionary<string, Kind> ModelSymbols { get; } = new Dictionary<string, Kind>
    {
        ["VA"] = Kinds.AlveolarVentilationToKeep,
        ["VD"] = Kinds.DeadSpaceVolume,
        ["R"] = AirwayResistance.Value,
        ["C"] = StaticCompliance.Value,
    };

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Model of breathing rate";

    /// <inheritdoc/>
    public override string Summary => "Breath rate at which elastic and resistive work a minute is least for a given alveolar ventilation.";

    /// <inheritdoc/>
    public override string Equation => "fW = (√(1 + 4π²·RC·VA/VD) − 1) / (2π²·RC), RC = R·C/60000 in min, VA/VD in /min";

    /// <inheritdoc/>
    public override string Assumptions => "Sinusoidal flow, linear resistance and compliance, constant dead space; turbulence and inertia left out. Time constant 0.05 to 3 s.";

    /// <inheritdoc/>
    public override string Caution => "A model value, not a setting and not advice: never to be entered into a ventilator.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (8, 35);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => ModelSymbols;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.InputInvalid, "the time constant R·C is outside 0.05 to 3 s", [], MinimumWorkRate.OutOfRange, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 20, "mL/cm[H2O]"), ("R", 1, "cm[H2O].s/L")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Otis AB, Fenn WO, Rahn H. Mechanics of breathing in man. J Appl Physiol 1950;2:592 (criterion; closed form derived from it)"),
        new("Breathing rates at rest: normal 16 to 18, obstructed 10 to 12, stiff 20 to 25 per minute. Common practice, no single source"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "where f·R·C = 1/π² the derivative vanishes at VT = 3·VD: 4.5 L/min, 0.15 L, f = VA/(2·VD)", 15, 0.0005, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 40.5285, "mL/cm[H2O]"), ("R", 10, "cm[H2O].s/L")),
        new(Evidence.Limit, "normal lung breathes 16 to 18 a minute (common practice, no single source)", 17, 1, ("VA", 4.5, "L/min"), ("VD", 0.15, "L"), ("C", 0.1, "L/cm[H2O]"), ("R", 3, "cm[H2O].s/L")),
    ];

    /// <summary>Ventilation in L/min, dead space in mL, resistance in cm[H2O].s/L (may be 0), compliance in mL/cm[H2O].</summary>
    public static double Of(double ventilation, double deadSpace, double resistance, double compliance)
    {
        var perDeadSpace = 1000 * ventilation / deadSpace;
        return 2 * perDeadSpace / (Math.Sqrt(1 + (4 * Math.PI * Math.PI * resistance * compliance / 60_000 * perDeadSpace)) + 1);
    }

    /// <summary>True when resistance and compliance make a time constant for which the model was not made.</summary>
    internal static bool OutOfRange(Roots x) =>
        x.Has(Resistance) && x.Has(Compliance) && TimeConstantExpiratory.Of(x[Resistance], x[Compliance]) is < 0.05 or > 3;
}
