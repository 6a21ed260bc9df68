using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Conductance of the alveolar-capillary membrane for carbon monoxide.</summary>
/// <remarks>DM,CO = DM,NO/α: both gases cross the same membrane, nitric oxide α times as easily.</remarks>
public sealed class MembraneConductanceCo : Definition
{
    private static readonly Slot Anchor = new(Kinds.MembraneConductanceNO, new Pairing.AnchorItself());
    private static readonly Slot Ratio = new(Kinds.DiffusivityRatio, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("membrane-conductance-co", "DM_CO", "membrane conductance for carbon monoxide", "mL/min/mm[Hg]", 5, 400,
        Tolerance.Deviation(0, 0.25, "typical"), [Anchor, Ratio], x => Of(x[Anchor], x[Ratio]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "Membrane conductance for carbon monoxide from that for nitric oxide.";

    /// <inheritdoc/>
    public override string Equation => "DM_CO = DM_NO/alpha_NO_CO";

    /// <inheritdoc/>
    public override string Assumptions => "Constant: diffusivity ratio 1.97 unless another is given. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. Depends on the diffusivity ratio; published ratios differ. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (40, 130);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.MembraneConductanceNO]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Hughes JMB, van der Lee I. The TLNO/TLCO ratio in pulmonary function test interpretation. Eur Respir J 2013;41:453, table (paper from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Hughes and van der Lee 2013, table: DM,NO 144", 73, 0.5,
            ("DM_NO", 144, "mL/min/mm[Hg]"), ("alpha_NO_CO", 1.97, "1")),
        new(Evidence.Published, "Hughes and van der Lee 2013, table: DM,NO 230", 117, 0.5,
            ("DM_NO", 230, "mL/min/mm[Hg]")),
    ];

    /// <summary>Conductance for nitric oxide and the diffusivity ratio.</summary>
    public static double Of(double nitricOxide, double ratio) => nitricOxide / ratio;
}
