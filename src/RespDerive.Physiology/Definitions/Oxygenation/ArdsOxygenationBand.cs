using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Band of the oxygenation criterion of the definitions of acute respiratory distress syndrome. Not a diagnosis.</summary>
/// <remarks>
/// Berlin 2012: P/F over 200 to 300 mild, over 100 to 200 moderate, up to 100 severe, at a PEEP or CPAP of at least 5 cm[H2O];
/// above 1000 m the P/F ratio times PB/760. Global 2023, intubated: the same, or S/F over 235 to 315 mild, over 148 to 235 moderate, up to 148 severe,
/// only at an SpO2 of up to 97 %; not intubated: P/F up to 300 or S/F up to 315 meets the criterion, without severity.
/// The global criteria for limited resources ask for an S/F up to 315 alone.
/// </remarks>
public sealed class ArdsOxygenationBand : Classification
{
    private const string Intubated = "invasive ventilation";
    private const string Berlin = "berlin-2012";
    private const string Global = "global-2023";
    private const string LimitedResources = "global-2023-limited-resources";

    /// <summary>Pressure of the standard atmosphere at 1000 m, mm[Hg].</summary>
    private static readonly double PressureAt1000 = StandardAtmosphere.PressureMmHg(1000);

    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    private static readonly string[] Severities = ["severe", "moderate", "mild", "none"];

    private static readonly Slot Pf = new(PfRatio.Value, new Pairing.AnchorItself());

    private static readonly Option Sf = new([new Term(SfRatio.Value, new Pairing.AnchorItself()), new Term(Kinds.SpO2, new Pairing.AnchorItself())]);

    private static readonly Slot Ratio = new("P/F ratio, or S/F ratio with its SpO2", [.. Pf.Options, Sf]) { Alternatives = true };

    private static readonly Slot Peep = new("PEEP", [new Option(Kinds.PeepSet, new Pairing.InForce()), new Option(Kinds.Peep, new Pairing.Nearest(Near, Near))]);

    private static readonly Slot Support = new("PEEP or kind of respiratory support", [.. Peep.Options, new Option(Kinds.Support, new Pairing.InForce()), new Option(Kinds.SupportNotStated, new Pairing.ByHand())]);

    private static readonly Slot Altitude = new("barometric pressure",
        [new Option(Kinds.BarometricPressure, new Pairing.Site(TimeSpan.FromHours(6))), new Option(Kinds.NoAltitudeCorrection, new Pairing.Site(TimeSpan.Zero))]);

    private static readonly Criterion BerlinByPf = new(Berlin, new PfRatio(), Severities, [100, 200, 300], true, PfAtSeaLevel);
    private static readonly Criterion GlobalByPf = BerlinByPf with { Name = Global };
    private static readonly Criterion GlobalBySf = new(Global, new SfRatio(), Severities, [148, 235, 315], true, x => x[SfRatio.Value]);
    private static readonly Criterion MetByPf = new(Global, new PfRatio(), ["met", "none"], [300], true, PfAtSeaLevel);
    private static readonly Criterion MetBySf = new(Global, new SfRatio(), ["met", "none"], [315], true, x => x[SfRatio.Value]);
    private static readonly Criterion LimitedBySf = MetBySf with { Name = LimitedResources };

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Classified("ards-oxygenation-band", "ARDSband", "band of the oxygenation criterion of acute respiratory distress syndrome",
        ["none", "mild", "moderate", "severe", "met"], [Ratio, Support, Altitude], Index);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Bands";

    /// <inheritdoc/>
    public override string Summary => "Band of the oxygenation criterion in which the posted P/F or S/F ratio lies, by the Berlin (2012) or global (2023) criteria.";

    /// <inheritdoc/>
    public override string Equation => "ARDSband = none | mild | moderate | severe by PF > 300 | > 200 | > 100 | ≤ 100, or by SF > 315 | > 235 | > 148 | ≤ 148; met by PF ≤ 300 or SF ≤ 315 when not intubated";

    /// <inheritdoc/>
    public override string Assumptions => "Adults. P/F ratio before S/F ratio; Berlin with a P/F ratio and a PEEP, else global, unless the criteria are named. Below the pressure at 1000 m the P/F ratio is corrected for altitude. The flow of high-flow oxygen (at least 30 L/min) is not judged; nor are timing, imaging and origin of oedema, without which there is no syndrome.";

    /// <inheritdoc/>
    public override string Caution => "A band of the oxygenation criterion, never a diagnosis. Check the source of FiO2 and the PEEP. Pulse oximetry overestimates in dark skin and poor perfusion.";

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2, Kinds.SpO2], Cadence.QuarterHour) { OnlyWith = [Kinds.Support, .. Slots.Ventilated] };

    /// <inheritdoc/>
    public override IReadOnlyList<Criterion> Criteria => [BerlinByPf, GlobalByPf, GlobalBySf, MetByPf, MetBySf, LimitedBySf];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 8, "cm[H2O]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("PaO2", 180, "mm[Hg]"), ("FiO2", 0.21, "1"), ("PaCO2", 40, "mm[Hg]"), ("PB", 760, "mm[Hg]"), ("PEEP", 8, "cm[H2O]")] },
        CommonGates.Adult with { TrippedBy = [.. Example, ("age", 12, "a")] },
        new Gate(Withheld.InputMissing, "the criteria that are named lack their ratio, their PEEP or the kind of support", [Kinds.Support], Incomplete,
            ("SF", 200, "%"), ("SpO2", 92, "%"), ("PEEP", 8, "cm[H2O]")) { ReadsByHand = [Kinds.OxygenationCriteria] },
        new Gate(Withheld.Fio2Estimated, "FiO2 of low-flow oxygen is an estimate", [Kinds.Support], x => x.Code(Kinds.Support) == "low-flow oxygen" && NameFor(x) != LimitedResources,
            ("SF", 240, "%"), ("SpO2", 92, "%"), ("support", "low-flow oxygen")),
        new Gate(Withheld.PeepBelowMinimum, "no PEEP of at least 5 cm[H2O]", [Kinds.Support], WithoutPeep, ("PF", 150, "mm[Hg]"), ("PEEP", 3, "cm[H2O]")),
        new Gate(Withheld.Spo2Above97, "the S/F ratio is of an SpO2 above 97 %", [], SaturationTooHigh,
            ("SF", 240, "%"), ("SpO2", 99, "%"), ("support", Intubated)),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules =>
    [
        CommonGates.Settling,
        new FlagRule(Flags.AgeUnconfirmed, [Kinds.Age], x => !x.Has(Kinds.Age)),
        new FlagRule(Flags.AltitudeUnknown, [], x => !UsesSf(x) && !x.Has(Kinds.BarometricPressure)),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("ARDS Definition Task Force. Berlin definition. JAMA 2012;307:2526, table 3", "10.1001/jama.2012.5669"),
        new("Matthay MA et al. A new global definition of acute respiratory distress syndrome. Am J Respir Crit Care Med 2024;209:37, table of criteria"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Berlin 2012, table 3: 300 is mild", 1, 0, ("PF", 300, "mm[Hg]"), ("PEEP", 5, "cm[H2O]")),
        new(Evidence.Published, "Berlin 2012, table 3: 100 is severe", 3, 0, ("PF", 100, "mm[Hg]"), ("PEEP", 5, "cm[H2O]")),
        new(Evidence.Published, "Berlin 2012, table 3, altitude: 150 at 500 mm[Hg] is 98.7", 3, 0, ("PF", 150, "mm[Hg]"), ("PEEP", 5, "cm[H2O]"), ("PB", 500, "mm[Hg]")),
        new(Evidence.Published, "global criteria: an S/F of 235 is moderate", 2, 0, ("SF", 235, "%"), ("SpO2", 94, "%"), ("support", Intubated)),
        new(Evidence.Published, "global criteria, not intubated: an S/F of 315 meets them", 4, 0, ("SF", 315, "%"), ("SpO2", 94, "%"), ("support", "high-flow oxygen")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 8, "cm[H2O]")];

    /// <inheritdoc/>
    public override string Text(string code) => code switch
    {
        "none" => "Oxygenation criterion not met",
        "met" => "Oxygenation criterion met, without severity",
        _ => $"Oxygenation criterion: {code} band",
    };

    /// <inheritdoc/>
    public override Criterion CriterionFor(Roots roots) => Applying(roots);

    private static Criterion Applying(Roots x) => (NameFor(x), UsesSf(x), x.Code(Kinds.Support)) switch
    {
        (LimitedResources, _, _) => LimitedBySf,
        (Berlin, _, _) => BerlinByPf,
        (_, false, Intubated) => GlobalByPf,
        (_, true, Intubated) => GlobalBySf,
        (_, false, _) => MetByPf,
        _ => MetBySf,
    };

    private static string NameFor(Roots x) => x.Code(Kinds.OxygenationCriteria)
        ?? (x.Has(Pf) && x.Has(Peep) && x.Code(Kinds.Support) != "high-flow oxygen" ? Berlin : Global);

    private static bool UsesSf(Roots x) => !x.Has(Pf) || x.Code(Kinds.OxygenationCriteria) == LimitedResources;

    /// <summary>Beside an SpO2 that forbids the S/F ratio anyway nothing else is asked for.</summary>
    private static bool Incomplete(Roots x) => x.Has(Ratio) && !SaturationTooHigh(x) && NameFor(x) switch
    {
        Berlin => !x.Has(Pf) || !x.Has(Peep),
        LimitedResources => !Sf.Complete(x),
        _ => !x.Has(Kinds.Support),
    };

    private static bool SaturationTooHigh(Roots x) => UsesSf(x) && x.Has(Kinds.SpO2) && x[Kinds.SpO2] > 97;

    private static bool WithoutPeep(Roots x) => NameFor(x) != LimitedResources && x.Code(Kinds.Support) != "high-flow oxygen"
        && (x.Code(Kinds.Support) == "none" || (x.Has(Peep) && x[Peep] < 5));

    private static double PfAtSeaLevel(Roots x) =>
        x[PfRatio.Value] * (x.Has(Kinds.BarometricPressure) && x[Kinds.BarometricPressure] < PressureAt1000 ? x[Kinds.BarometricPressure] / 760 : 1);

    private static double Index(Roots x)
    {
        var criterion = Applying(x);
        return Value.Codes.ToList().IndexOf(criterion.Code(Publication.Round(criterion.Of(x), criterion.Number.Decimals)));
    }
}
