using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Part of the cardiac output that passes the lung without taking up oxygen.</summary>
/// <remarks>
/// QsQt = (CcO2 − CaO2)/(CcO2 − CvO2), contents in mL/dL, all with the same haemoglobin and constants.
/// On pure oxygen it is the anatomical shunt, below that venous admixture.
/// </remarks>
public sealed class ShuntFraction : Definition
{
    private static readonly Slot Capillary = new(OxygenContentEndCapillary.Value, new Pairing.SameSample());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("shunt-fraction", "QsQt", "shunt fraction", "1", -0.05, 0.95,
        Tolerance.Deviation(0.04, 0, "typical"), [TransportGates.Arterial, Capillary, TransportGates.Venous],
        x => Of(x[OxygenContentEndCapillary.Value], x[OxygenContent.Value], x[OxygenContentVenous.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Shunted part of the cardiac output from end-capillary, arterial and mixed venous oxygen contents (Qs/Qt).";

    /// <inheritdoc/>
    public override string Equation => "QsQt = (CcO2 − CaO2) / (CcO2 − CvO2)";

    /// <inheritdoc/>
    public override string Assumptions => "Mixed venous sample of the pulmonary artery within 5 min of the arterial one; full alveolar gas equation; one haemoglobin. Below an inspired fraction of 1 it is venous admixture.";

    /// <inheritdoc/>
    public override string Caution => "A saturation error of one per cent moves it by about three points. Rests on an assumed exchange ratio and on the constants shown; central venous blood is no substitute. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.02, 0.05);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.SvO2] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("CaO2", 14, "mL/dL"), ("CcO2", 20, "mL/dL"), ("CvO2", 12, "mL/dL"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 99, "%"), ("PaO2", 180, "mm[Hg]"), ("SvO2", 65, "%"), ("PvO2", 36, "mm[Hg]")] },
        TransportGates.DyshemoglobinKnown with { TrippedBy = [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("FO2Hb", 91, "%"), ("PaO2", 70, "mm[Hg]"), ("SvO2", 65, "%"), ("PvO2", 36, "mm[Hg]")] },
        TransportGates.MixedVenous with { TrippedBy = [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 93, "%"), ("PaO2", 70, "mm[Hg]"), ("ScvO2", 65, "%"), ("PvO2", 36, "mm[Hg]")] },
        TransportGates.VenousBelowArterial with { TrippedBy = [("CcO2", 20, "mL/dL"), ("CaO2", 17, "mL/dL"), ("CvO2", 17, "mL/dL")] },
        new Gate(Withheld.UncertaintyTooLarge, "CcO2 is less than 2 mL/dL above CvO2", [], x => x.Has(Capillary) && x.Has(TransportGates.Venous)
            && x[Capillary] - x[TransportGates.Venous] < 2, ("CcO2", 20, "mL/dL"), ("CaO2", 19, "mL/dL"), ("CvO2", 18.5, "mL/dL")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.3;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Berggren SM. The oxygen deficit of arterial blood caused by non-ventilating parts of the lung. Acta Physiol Scand 1942;4 Suppl 11 (from memory)"),
        new("West JB. Respiratory physiology: the essentials, ventilation-perfusion relationships (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems", 0.166, 0.002, ("CcO2", 20.399, "mL/dL"), ("CaO2", 19.36, "mL/dL"), ("CvO2", 14.19, "mL/dL")),
        new(Evidence.Limit, "one half when the arterial content is midway between the other two", 0.5, 1e-9, ("CcO2", 20, "mL/dL"), ("CaO2", 17, "mL/dL"), ("CvO2", 14, "mL/dL")),
    ];

    private static Given[] Example => [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 93, "%"), ("PaO2", 70, "mm[Hg]"), ("SvO2", 65, "%"), ("PvO2", 36, "mm[Hg]")];

    /// <summary>Contents in mL/dL.</summary>
    public static double Of(double capillary, double arterial, double venous) => (capillary - arterial) / (capillary - venous);
}
