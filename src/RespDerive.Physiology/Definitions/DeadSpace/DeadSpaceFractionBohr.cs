using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Part of each breath that takes no part in gas exchange, by Bohr's own equation.</summary>
/// <remarks>VD/VT = (PACO2 − PECO2) / PACO2 with the mean alveolar PCO2 of volumetric capnography; leaves out the effect of shunt.</remarks>
public sealed class DeadSpaceFractionBohr : Definition
{
    private static readonly Slot Alveolar = new(Kinds.MeanAlveolarCO2, new Pairing.AnchorItself());
    private static readonly Slot Expired = new(Kinds.MixedExpiredCO2, CarbonDioxideSlots.AroundDraw);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dead-space-fraction-bohr", "VDVTBohr", "dead space over tidal volume (Bohr)", "1", 0.05, 0.95,
        Tolerance.Deviation(0.08, 0, "typical"), [Alveolar, Expired], x => DeadSpaceFractionEnghoff.Of(x[Alveolar], x[Expired]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Dead space as a fraction of tidal volume, by the Bohr equation.";

    /// <inheritdoc/>
    public override string Equation => "VDVTBohr = (PACO2_mean − PECO2)/PACO2_mean";

    /// <inheritdoc/>
    public override string Assumptions => "Mean alveolar PCO2 from the middle of phase III of volumetric capnography; both from the same breaths; apparatus dead space not taken off. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Not the Enghoff value: lower wherever there is shunt. End-tidal is neither of its inputs. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.2, 0.35);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.MeanAlveolarCO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CarbonDioxideGates.NoMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        new Gate(Withheld.ExpiredExceedsArterial, "mixed expired PCO2 is not below mean alveolar PCO2", [],
            x => x.Has(Alveolar) && x.Has(Expired) && x[Expired] >= x[Alveolar], ("PACO2_mean", 30, "mm[Hg]"), ("PECO2", 31, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Bohr C. Über die Lungenathmung. Skand Arch Physiol 1891;2:236 (from memory)"),
        new("Tusman G, Sipmann FS, Bohm SH. Rationale of dead space measurement by volumetric capnography. Anesth Analg 2012;114:866, abstract"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "expired gas at half the alveolar tension: half of the breath is dead space", 0.5, 1e-9,
            ("PACO2_mean", 36, "mm[Hg]"), ("PECO2", 18, "mm[Hg]")),
        new(Evidence.Limit, "a quarter of the breath empty: expired gas at three quarters of the alveolar tension", 0.25, 1e-9,
            ("PACO2_mean", 40, "mm[Hg]"), ("PECO2", 30, "mm[Hg]")),
    ];

    private static Given[] Example => [("PACO2_mean", 36, "mm[Hg]"), ("PECO2", 24, "mm[Hg]")];
}
