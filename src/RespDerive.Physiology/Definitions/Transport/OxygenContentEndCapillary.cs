using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen that blood would hold after full contact with the alveoli.</summary>
/// <remarks>
/// CcO2 = huefner·Hb·ScO2·(1 − COHb − MetHb) + alpha·PAO2: PAO2 from the full alveolar gas equation, ScO2 by the Severinghaus curve at that
/// tension, pH 7.40 and 37 °C, unless given; units as for the arterial content.
/// </remarks>
public sealed class OxygenContentEndCapillary : Definition
{
    /// <summary>Given by hand, else by the curve, whose misfit is then a root.</summary>
    private static readonly Slot Saturation = new(Kinds.EndCapillarySaturation.Name,
        [
            new Option(Kinds.EndCapillarySaturation, new Pairing.ByHand()),
            new Option(Kinds.SeveringhausMisfit, new Pairing.Site(TimeSpan.Zero)),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-content-end-capillary", "CcO2", "oxygen content of end-capillary blood", "mL/dL", 1, 35,
        Tolerance.Deviation(0.15, 0, "saturation and tension only: the error of a common haemoglobin is not known of a content given by hand"),
        [BloodSlots.Hemoglobin, Saturation, new Slot(AlveolarPo2.Value, new Pairing.SameSample()), BloodSlots.Dyshemoglobin, BloodSlots.Huefner, BloodSlots.Solubility],
        Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Oxygen content of ideal end-capillary blood: bound to haemoglobin and dissolved.";

    /// <inheritdoc/>
    public override string Equation => "CcO2 = huefner·Hb·ScO2·(1 − COHb − MetHb) + alpha·PAO2";

    /// <inheritdoc/>
    public override string Assumptions => "As for alveolar PO2; saturation by the standard curve at pH 7.40; the same haemoglobin, and the same part of it unable to bind, as in arterial blood. Constants 1.34 mL/g and 0.003 mL/dL/mm[Hg] unless given.";

    /// <inheritdoc/>
    public override string Caution => "A model value: no such blood can be sampled. Rests on an assumed exchange ratio and on the site's barometric pressure.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (10, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("West JB. Respiratory physiology: the essentials, ventilation-perfusion relationships (from memory)"),
        new("Severinghaus JW. J Appl Physiol 1979;46:599, equation 1"),
        new("Hüfner number 1.34 mL/g and solubility 0.003 mL/dL/mm[Hg]: common practice; 1.31 to 1.39 and 0.0031 are also in use"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: end-capillary, saturation taken as 1", 20.399, 0.001, ("Hb", 15, "g/dL"), ("ScO2", 1, "1"), ("PAO2", 99.73, "mm[Hg]")),
        new(Evidence.Limit, "at 60 mm[Hg] the curve gives 225000/248400: 1.34·10·0.905797 + 0.003·60", 12.31768116, 1e-7, ("Hb", 10, "g/dL"), ("PAO2", 60, "mm[Hg]")),
    ];

    private static Given[] Example => [("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 12, "g/dL")];

    private static double Compute(Roots x)
    {
        var saturation = x.Has(Kinds.EndCapillarySaturation)
            ? x[Kinds.EndCapillarySaturation] / 100
            : SeveringhausCurve.Saturation(x[AlveolarPo2.Value]) + (x[Kinds.SeveringhausMisfit] / 100);
        return BloodSlots.Content(x, saturation * BloodSlots.Active(x), x[AlveolarPo2.Value]);
    }
}
