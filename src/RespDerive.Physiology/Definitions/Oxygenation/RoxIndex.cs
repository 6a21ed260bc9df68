using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygenation by pulse oximetry per breath rate on high-flow nasal oxygen.</summary>
/// <remarks>
/// ROX = SpO2 / FiO2 / RR, SpO2 in percent, FiO2 a fraction, counted breaths per minute; by convention without a unit.
/// Defined for high-flow nasal oxygen only: the record must prove it by a reading of the kind of support.
/// </remarks>
public sealed class RoxIndex : Definition
{
    private static readonly TimeSpan TwoMinutes = TimeSpan.FromMinutes(2);

    private static readonly Slot Anchor = new(Kinds.SpO2, new Pairing.AnchorItself());

    private static readonly Slot Rate = new(Kinds.RespiratoryRate, new Pairing.Nearest(TwoMinutes, TwoMinutes));

    /// <summary>By hand the word of who asks is taken; a record must say it.</summary>
    private static readonly Slot HighFlow = new(Kinds.Support.Name,
        [new Option(Kinds.Support, new Pairing.InForce()), new Option(Kinds.HighFlowTaken, new Pairing.ByHand(), Flags.SupportUnconfirmed)], Withheld.NotOnHighFlow);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("rox-index", "ROX", "ROX index", "1", 0.5, 40,
        Tolerance.Deviation(0, 0.06, "typical"), [Anchor, Slots.FiO2, Rate, HighFlow], x => Of(x[Anchor], x[Slots.FiO2], x[Rate]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "S/F ratio divided by the respiratory rate, on high-flow nasal oxygen (ROX index).";

    /// <inheritdoc/>
    public override string Equation => "ROX = SpO2 / FiO2 / RR";

    /// <inheritdoc/>
    public override string Assumptions => "Adults on high-flow nasal oxygen; breath rate of 6 to 70 /min counted on the patient, not taken from a ventilator. Cut-points of the literature depend on the time since the start, which is not judged here.";

    /// <inheritdoc/>
    public override string Caution => "An adjunct; pulse oximetry overestimates in dark skin and poor perfusion. Not a diagnosis, and no reason by itself to wait or to act.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (2, 25);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.SpO2], Cadence.QuarterHour) { OnlyWith = [Kinds.Support] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.NotOnHighFlow, "the support is not high-flow oxygen", [], x => x.Has(Kinds.Support) && x.Code(Kinds.Support) != "high-flow oxygen",
            [.. Example, ("support", "low-flow oxygen")]),
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.Adult with { TrippedBy = [.. Example, ("age", 12, "a")] },
        new Gate(Withheld.InputInvalid, "the respiratory rate is below 6 or above 70 /min", [], x => x.Has(Rate) && x[Rate] is < 6 or > 70,
            ("SpO2", 92, "%"), ("FiO2", 0.5, "1"), ("RR", 4, "/min")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [new FlagRule(Flags.AgeUnconfirmed, [Kinds.Age], x => !x.Has(Kinds.Age)), new FlagRule(Flags.Spo2Above97, [], x => x[Anchor] > 97)];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Roca O et al. Predicting success of high-flow nasal cannula in pneumonia patients with hypoxemic respiratory failure: the utility of the ROX index. J Crit Care 2016;35:200"),
        new("Roca O et al. An index combining respiratory rate and oxygenation to predict outcome of nasal high-flow therapy. Am J Respir Crit Care Med 2019;199:1368"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 90 / 0.6 / 30", 5, 1e-9, ("SpO2", 90, "%"), ("FiO2", 0.6, "1"), ("RR", 30, "/min"), ("support", "high-flow oxygen")),
        new(Evidence.Limit, "half at twice the rate: 90 / 0.9 / 40", 2.5, 1e-9, ("SpO2", 90, "%"), ("FiO2", 0.9, "1"), ("RR", 40, "/min")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["RR"] = Kinds.RespiratoryRate };

    private static Given[] Example => [("SpO2", 92, "%"), ("FiO2", 0.5, "1"), ("RR", 30, "/min")];

    /// <summary>SpO2 in percent, FiO2 a fraction, breaths per minute.</summary>
    public static double Of(double spo2, double fio2, double rate) => spo2 / fio2 / rate;
}
