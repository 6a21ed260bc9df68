using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>S/F ratio that goes with a P/F ratio on average.</summary>
/// <remarks>
/// SFexp = 64 + 0.84·PF, PF in mm[Hg]: the regression line of Rice 2007, by which an S/F of 235 stands for a P/F of 200 and 315 for 300.
/// </remarks>
public sealed class SfRatioExpectedFromPf : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("sf-ratio-expected-from-pf", "SFexp", "S/F ratio expected from the P/F ratio", "%", 40, 480,
        Tolerance.Deviation(0, 0.1, "scatter about the line, own judgement"), [new Slot(PfRatio.Value, new Pairing.ByHand())], x => Of(x[PfRatio.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "S/F ratio that goes with a P/F ratio on average.";

    /// <inheritdoc/>
    public override string Equation => "SFexp = 64 + 0.84·PF";

    /// <inheritdoc/>
    public override string Assumptions => "Adults with acute lung injury; SpO2 up to 97 %. No range given by the source. The scatter about the line is not in the uncertainty.";

    /// <inheritdoc/>
    public override string Caution => "An average relation, not a conversion of one patient's value. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (80, 470);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.Arterial,
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Rice TW et al. Comparison of the SpO2/FIO2 ratio and the PaO2/FIO2 ratio in patients with acute lung injury or ARDS. Chest 2007;132:410, abstract"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Rice 2007: an S/F of 315 stands for a P/F of 300", 315, 1.5, ("PF", 300, "mm[Hg]")),
        new(Evidence.Published, "Rice 2007: an S/F of 235 stands for a P/F of 200", 235, 3.5, ("PF", 200, "mm[Hg]")),
    ];

    /// <summary>P/F ratio in mm[Hg]; result in percent.</summary>
    public static double Of(double pf) => 64 + (0.84 * pf);
}
