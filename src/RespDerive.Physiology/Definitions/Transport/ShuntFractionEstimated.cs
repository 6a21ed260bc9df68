using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Shunt fraction with an assumed difference of arterial and mixed venous oxygen content.</summary>
/// <remarks>
/// QsQtest = (CcO2 − CaO2)/((CcO2 − CaO2) + avDO2), contents in mL/dL; avDO2 assumed 3.5 mL/dL (stable critical illness), 5 in health.
/// </remarks>
public sealed class ShuntFractionEstimated : Definition
{
    private static readonly Slot Capillary = new(OxygenContentEndCapillary.Value, new Pairing.SameSample());

    private static readonly Slot Difference = new Slot(Kinds.ArteriovenousGuess, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("shunt-fraction-estimated", "QsQtest", "shunt fraction, estimated without mixed venous blood", "1", -0.05, 0.95,
        Tolerance.Deviation(0.05, 0, "typical"), [TransportGates.Arterial, Capillary, Difference],
        x => Of(x[OxygenContentEndCapillary.Value], x[OxygenContent.Value], x[Difference]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Shunted part of the cardiac output with an assumed arteriovenous oxygen difference.";

    /// <inheritdoc/>
    public override string Equation => "QsQtest = (CcO2 − CaO2) / (CcO2 − CaO2 + avDO2)";

    /// <inheritdoc/>
    public override string Assumptions => "The arteriovenous difference is assumed, 3.5 ± 1 mL/dL unless given; with a low or high cardiac output it is wrong. Full alveolar gas equation; one haemoglobin.";

    /// <inheritdoc/>
    public override string Caution => "An estimate: a changed cardiac output or consumption changes it without any change of the lung. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.02, 0.05);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.SaO2, Kinds.FractionalOxyhemoglobin] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("CaO2", 14, "mL/dL"), ("CcO2", 20, "mL/dL"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 99, "%"), ("PaO2", 180, "mm[Hg]")] },
        TransportGates.DyshemoglobinKnown with { TrippedBy = [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("FO2Hb", 91, "%"), ("PaO2", 70, "mm[Hg]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.3;

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes => [StandardCode.Loinc("60822-4", "Estimated pulmonary Shunt fraction")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Berggren SM. Acta Physiol Scand 1942;4 Suppl 11 (shunt equation; from memory)"),
        new("Assumed arteriovenous difference of 3.5 mL/dL in critical illness, 5 in health: common practice, no single source"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: difference assumed 3.5", 0.227, 0.002, ("CcO2", 20.399, "mL/dL"), ("CaO2", 19.36, "mL/dL"), ("assumed_avDO2", 3.5, "mL/dL")),
        new(Evidence.Limit, "one half when the arterial deficit equals the difference", 0.5, 1e-9, ("CcO2", 20, "mL/dL"), ("CaO2", 16, "mL/dL"), ("assumed_avDO2", 4, "mL/dL")),
    ];

    private static Given[] Example => [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 93, "%"), ("PaO2", 70, "mm[Hg]")];

    /// <summary>Contents and difference in mL/dL.</summary>
    public static double Of(double capillary, double arterial, double difference) => (capillary - arterial) / (capillary - arterial + difference);
}
