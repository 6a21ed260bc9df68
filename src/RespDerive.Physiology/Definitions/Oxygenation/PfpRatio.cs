using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>P/F ratio weighed against the end-expiratory pressure spent on it.</summary>
/// <remarks>
/// PFP = 10·PaO2 / (FiO2·PEEP), PEEP in cm[H2O]. At a PEEP of 10 it equals the P/F ratio.
/// The PEEP is the applied one, set before measured; total PEEP is another quantity and never mixed in.
/// </remarks>
public sealed class PfpRatio : Definition
{
    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    private static readonly Slot Peep = new("applied PEEP", [new Option(Kinds.PeepSet, new Pairing.InForce()), new Option(Kinds.Peep, new Pairing.Nearest(Near, Near))]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("pfp-ratio", "PFP", "P/F ratio over PEEP", "mm[Hg]/cm[H2O]", 5, 1200,
        Tolerance.Deviation(0, 0.13, "typical"), [Slots.PaO2, Slots.FiO2, Peep], x => Of(x[Slots.PaO2], x[Slots.FiO2], x[Peep]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Arterial oxygen tension over inspired oxygen fraction and PEEP, scaled to equal the P/F ratio at a PEEP of 10 (P/FP ratio).";

    /// <inheritdoc/>
    public override string Equation => "PFP = 10·PaO2 / (FiO2·PEEP)";

    /// <inheritdoc/>
    public override string Assumptions => "Adults on invasive ventilation; applied PEEP of at least 5 cm[H2O], the lower limit of the source; as for the P/F ratio otherwise.";

    /// <inheritdoc/>
    public override string Caution => "Not a diagnosis. Check the source of FiO2; not to be confused with the product P/F × PEEP.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (20, 400);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = Slots.Ventilated };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial with { TrippedBy = [("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 10, "cm[H2O]"), ("sample", "venous")] },
        CommonGates.Equilibrated with { TrippedBy = [.. Example, ("FiO2_changed_before_draw", 4, "min")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CommonGates.BelowAlveolar with { TrippedBy = [("PaO2", 180, "mm[Hg]"), ("FiO2", 0.21, "1"), ("PEEP", 10, "cm[H2O]"), ("PaCO2", 40, "mm[Hg]"), ("PB", 760, "mm[Hg]")] },
        new Gate(Withheld.WrongMode, "the applied PEEP of non-invasive ventilation is not comparable", [Kinds.Support],
            x => x.Code(Kinds.Support) == "non-invasive ventilation", [.. Example, ("support", "non-invasive ventilation")]),
        CommonGates.Adult with { TrippedBy = [.. Example, ("age", 12, "a")] },
        new Gate(Withheld.PeepZero, "PEEP is zero", [], x => x.Has(Peep) && x[Peep] == 0,
            ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 0, "cm[H2O]")),
        new Gate(Withheld.PeepBelowMinimum, "PEEP is below 5 cm[H2O]", [], x => x.Has(Peep) && x[Peep] is > 0 and < 5,
            ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 4, "cm[H2O]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling, new FlagRule(Flags.AgeUnconfirmed, [Kinds.Age], x => !x.Has(Kinds.Age))];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Palanidurai S et al. P/FP ratio: incorporation of PEEP into the PaO2/FiO2 ratio for prognostication and classification of acute respiratory distress syndrome. Ann Intensive Care 2021;11:124, abstract"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "at a PEEP of 10 it is the P/F ratio by construction: 75 / 0.5", 150, 1e-9, ("PaO2", 75, "mm[Hg]"), ("FiO2", 0.5, "1"), ("PEEP", 10, "cm[H2O]")),
        new(Evidence.Limit, "half of the P/F ratio at twice the PEEP: 60 / 0.3 / 2", 100, 1e-9, ("PaO2", 60, "mm[Hg]"), ("FiO2", 0.3, "1"), ("PEEPset", 20, "cm[H2O]")),
    ];

    private static Given[] Example => [("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PEEP", 10, "cm[H2O]")];

    /// <summary>PaO2 in mm[Hg], FiO2 a fraction, PEEP in cm[H2O].</summary>
    public static double Of(double pao2, double fio2, double peep) => 10 * pao2 / (fio2 * peep);
}
