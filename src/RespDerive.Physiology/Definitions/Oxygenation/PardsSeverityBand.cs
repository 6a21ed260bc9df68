using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Severity band of the oxygenation criterion of paediatric acute respiratory distress syndrome on invasive ventilation. Not a diagnosis.</summary>
/// <remarks>
/// PALICC 2015: oxygenation index 4 to under 8 mild, 8 to under 16 moderate, 16 and more severe; without a blood gas the oxygen saturation index,
/// 5 to under 7.5 mild, 7.5 to under 12.3 moderate, 12.3 and more severe, only at an SpO2 of up to 97 %.
/// </remarks>
public sealed class PardsSeverityBand : Classification
{
    private static readonly string[] Severities = ["at-risk-or-none", "mild", "moderate", "severe"];

    private static readonly Slot Oi = new(OxygenationIndex.Value, new Pairing.AnchorItself());

    private static readonly Slot Index = new("oxygenation index, or oxygen saturation index with its SpO2",
        [.. Oi.Options, new Option([new Term(OxygenSaturationIndex.Value, new Pairing.AnchorItself()), new Term(Kinds.SpO2, new Pairing.AnchorItself())])]) { Alternatives = true };

    private static readonly Criterion ByOi = new("palicc-2015", new OxygenationIndex(), Severities, [4, 8, 16], false, x => x[OxygenationIndex.Value]);
    private static readonly Criterion ByOsi = new("palicc-2015", new OxygenSaturationIndex(), Severities, [5, 7.5m, 12.3m], false, x => x[OxygenSaturationIndex.Value]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Classified("pards-severity-band", "PARDSband",
        "severity band of the oxygenation criterion of paediatric acute respiratory distress syndrome", Severities, [Index], Place);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Bands";

    /// <inheritdoc/>
    public override string Summary => "Severity band in which the posted oxygenation index or oxygen saturation index of a ventilated child lies (PALICC 2015).";

    /// <inheritdoc/>
    public override string Equation => "PARDSband = at-risk-or-none | mild | moderate | severe by OI < 4 | < 8 | < 16 | ≥ 16, or by OSI < 5 | < 7.5 | < 12.3 | ≥ 12.3";

    /// <inheritdoc/>
    public override string Assumptions => "Children on invasive ventilation; the source sets no age limit and leaves out perinatal lung disease. Oxygenation index before oxygen saturation index. Timing, imaging and origin of oedema, without which there is no syndrome, are not judged.";

    /// <inheritdoc/>
    public override string Caution => "A band of the oxygenation criterion, never a diagnosis. Not meaningful with cyanotic heart disease. Pulse oximetry overestimates in dark skin and poor perfusion.";

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2, Kinds.SpO2], Cadence.QuarterHour) { OnlyWith = [Kinds.MeanAirway] };

    /// <inheritdoc/>
    public override IReadOnlyList<Criterion> Criteria => [ByOi, ByOsi];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("Pmean", 15, "cm[H2O]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("PaO2", 180, "mm[Hg]"), ("FiO2", 0.21, "1"), ("Pmean", 15, "cm[H2O]"), ("PaCO2", 40, "mm[Hg]"), ("PB", 760, "mm[Hg]")] },
        new Gate(Withheld.WrongMode, "the bands are for invasive ventilation", [Kinds.Support],
            x => x.Has(Kinds.Support) && x.Code(Kinds.Support) != "invasive ventilation", [.. Example, ("support", "non-invasive ventilation")]),
        new Gate(Withheld.Spo2Above97, "the oxygen saturation index is of an SpO2 above 97 %", [], x => !x.Has(Oi) && x.Has(Kinds.SpO2) && x[Kinds.SpO2] > 97,
            ("OSI", 6, "1"), ("SpO2", 99, "%")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Pediatric Acute Lung Injury Consensus Conference Group. Pediatric acute respiratory distress syndrome. Pediatr Crit Care Med 2015;16:428, table of severity"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "PALICC 2015: an oxygenation index of 8 is moderate", 2, 0, ("OI", 8, "1")),
        new(Evidence.Published, "PALICC 2015: an oxygen saturation index of 12.3 is severe", 3, 0, ("OSI", 12.3, "1"), ("SpO2", 95, "%")),
        new(Evidence.Published, "PALICC 2015: 100·0.6·15/60 = 15 is moderate", 2, 0, ("FiO2", 0.6, "1"), ("Pmean", 15, "cm[H2O]"), ("PaO2", 60, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("Pmean", 15, "cm[H2O]")];

    /// <inheritdoc/>
    public override string Text(string code) =>
        code == "at-risk-or-none" ? "Oxygenation criterion not met, or at risk" : $"Oxygenation criterion: {code} band";

    /// <inheritdoc/>
    public override Criterion CriterionFor(Roots roots) => Applying(roots);

    private static Criterion Applying(Roots x) => x.Has(Oi) ? ByOi : ByOsi;

    private static double Place(Roots x)
    {
        var criterion = Applying(x);
        return Value.Codes.ToList().IndexOf(criterion.Code(Publication.Round(criterion.Of(x), criterion.Number.Decimals)));
    }
}
