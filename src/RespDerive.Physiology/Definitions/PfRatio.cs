using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Ratio of arterial oxygen tension to inspired oxygen fraction, for judging oxygenation across FiO2.</summary>
/// <remarks>
/// P/F = PaO2 / FiO2. PaO2 in mm[Hg] at 37 °C, FiO2 as a fraction delivered at the draw.
/// At constant shunt it still varies with FiO2, and it falls with altitude; the source gives no range.
/// </remarks>
public sealed class PfRatio : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("pf-ratio", "PF", "ratio of arterial oxygen tension to inspired oxygen fraction", "mm[Hg]", 20, 700,
        Tolerance.Deviation(0, 0.07, "typical"), [Slots.PaO2, Slots.FiO2], x => Of(x[Slots.PaO2], x[Slots.FiO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "Arterial oxygen tension divided by the inspired oxygen fraction (P/F ratio, Horowitz index).";

    /// <inheritdoc/>
    public override string Equation => "PF = PaO2 / FiO2";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial sample at 37 °C; FiO2 steady before the draw. Not comparable across altitude; varies with FiO2 at constant shunt.";

    /// <inheritdoc/>
    public override string Caution => "Not a diagnosis. Check the source of FiO2 and the PEEP.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (50, 500);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates => [CommonGates.Arterial, CommonGates.Equilibrated, CommonGates.Ecls, CommonGates.BelowAlveolar];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
        [StandardCode.Loinc("50984-4", "Horowitz index in Arterial blood"), StandardCode.Mdc("150656", "MDC_O2_OXYGENATION_RATIO")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Horowitz JH, Carrico CJ, Shires GT. Pulmonary response to major injury. Arch Surg 1974;108:349 (from memory)"),
        new("ARDS Definition Task Force. Berlin definition. JAMA 2012;307:2526, table 3 (units and form)", "10.1001/jama.2012.5669"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "teaching pages on the P/F ratio: 85 on 40 % is 212.5", 212.5, 0.05, ("PaO2", 85, "mm[Hg]"), ("FiO2", 0.40, "1")),
        new(Evidence.Limit, "on pure oxygen the ratio is the tension", 100, 1e-9, ("PaO2", 100, "mm[Hg]"), ("FiO2", 1, "1")),
        new(Evidence.Limit, "exact on paper: 60 / 0.30", 200, 1e-9, ("PaO2", 60, "mm[Hg]"), ("FiO2", 0.30, "1")),
    ];

    /// <summary>PaO2 (mm[Hg]) over FiO2 (fraction).</summary>
    public static double Of(double pao2, double fio2) => pao2 / fio2;
}
