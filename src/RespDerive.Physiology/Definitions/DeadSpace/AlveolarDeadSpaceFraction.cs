using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>How far end-tidal falls short of arterial carbon dioxide tension.</summary>
/// <remarks>(PaCO2 − PetCO2) / PaCO2: the alveolar dead space fraction (AVDSF), a third quantity beside the fractions of Bohr and Enghoff.</remarks>
public sealed class AlveolarDeadSpaceFraction : Definition
{
    private static readonly Slot EndTidal = new(Kinds.EndTidalCO2, CarbonDioxideSlots.AroundDraw);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("alveolar-dead-space-fraction", "AVDSF", "alveolar dead space fraction", "1", -0.1, 0.8,
        Tolerance.Deviation(0.09, 0, "typical"), [CarbonDioxideSlots.PaCO2, EndTidal], x => DeadSpaceFractionEnghoff.Of(x[CarbonDioxideSlots.PaCO2], x[EndTidal]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Arterial minus end-tidal over arterial carbon dioxide tension.";

    /// <inheritdoc/>
    public override string Equation => "AVDSF = (PaCO2 − PetCO2)/PaCO2";

    /// <inheritdoc/>
    public override string Assumptions => "Steady state; a capnogram with a plateau, median within 5 min of the draw. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Not VD/VT: it leaves out the airways. Falsely high when the capnogram has no plateau or gas leaks. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0, 0.15);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = [Kinds.EndTidalCO2] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CarbonDioxideGates.NoMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Bhalla AK, Rubin S, Newth CJL et al. Monitoring dead space in mechanically ventilated children: volumetric capnography versus time-based capnography. Respir Care 2015;60:1548 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 9/45", 0.2, 1e-9,
            ("PaCO2", 45, "mm[Hg]"), ("PetCO2", 36, "mm[Hg]")),
        new(Evidence.Limit, "no difference, no alveolar dead space", 0, 1e-9,
            ("PaCO2", 40, "mm[Hg]"), ("PetCO2", 40, "mm[Hg]")),
    ];

    private static Given[] Example => [("PaCO2", 45, "mm[Hg]"), ("PetCO2", 36, "mm[Hg]")];
}
