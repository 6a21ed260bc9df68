using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Work a breath that stretches lung and chest wall.</summary>
/// <remarks>
/// Wel = ½·E·VT²·0.0980665, VT in L, in joule. Above PEEP: what PEEP itself stores is left out.
/// </remarks>
public sealed class WorkElasticPerBreath : Definition
{
    /// <summary>One litre times one cm[H2O] in joule: 1e-3 m³ · 98.0665 Pa, exact.</summary>
    internal const double JoulePerLitre = 0.0980665;

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("work-elastic-per-breath", "Wel", "elastic work per breath", "J", 0, 10,
        Tolerance.Deviation(0, 0.25, "typical"), [new Slot(Elastance.Value, new Pairing.AnchorItself()), Slots.TidalVolume],
        x => Of(x[Elastance.Value], x[Slots.TidalVolume]));

    /// <summary>E, C and R as they are called here.</summary>
    internal static IReadOnlyDictionary<string, Kind> MechanicsSymbols { get; } =
        new Dictionary<string, Kind> { ["E"] = Elastance.Value, ["C"] = StaticCompliance.Value, ["R"] = AirwayResistance.Value };

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Mechanical power and work";

    /// <inheritdoc/>
    public override string Summary => "Half the elastance times the square of the tidal volume.";

    /// <inheritdoc/>
    public override string Equation => "Wel = 0.0980665·E/2·(VT/1000)²";

    /// <inheritdoc/>
    public override string Assumptions => "Passive patient, linear elastance above PEEP; the work of PEEP (PEEP·VT) is not included. Litre times cm[H2O] is 0.0980665 J exactly.";

    /// <inheritdoc/>
    public override string Caution =>
        "Work of the ventilator on the patient, not of the patient: the work of breathing needs an esophageal pressure. With "
        + "patient effort it reads falsely low.";

    /// <inheritdoc/>
    public override int Decimals => 3;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.05, 1);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => MechanicsSymbols;

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Passive with { TrippedBy = [.. Example, ("patient_effort", "true")] },
        VentilatorGates.NotByMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        CommonGates.PlateauAbovePeep with { TrippedBy = [("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"), ("VT", 420, "mL")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.PassivityUnconfirmed];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Otis AB, Fenn WO, Rahn H. Mechanics of breathing in man. J Appl Physiol 1950;2:592 (from memory)"),
        new("Hess DR. Respiratory mechanics in mechanically ventilated patients. Respir Care 2014;59:1773 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "area of the triangle: ½·10·0.5² L·cm[H2O]", 0.12258, 1e-05, ("E", 10, "cm[H2O]/L"), ("VT", 0.5, "L")),
        new(Evidence.Limit, "half the driving pressure times the volume: ½·20·0.4 L·cm[H2O] = 4·98.0665 mJ", 0.392266, 1e-9, ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("VT", 0.4, "L")),
    ];

    private static Given[] Example => [("E", 10, "cm[H2O]/L"), ("VT", 500, "mL")];

    /// <summary>Elastance in cm[H2O]/L, volume in mL.</summary>
    public static double Of(double elastance, double volume) => JoulePerLitre * elastance / 2 * volume * volume / 1e6;
}
