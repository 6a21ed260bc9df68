using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Part of each breath that takes no part in gas exchange, by Enghoff's form of Bohr's equation.</summary>
/// <remarks>
/// VD/VT = (PaCO2 − PECO2) / PaCO2. PECO2 is mixed expired, never end-tidal; without a reading it is 0.863·VCO2/VE.
/// Contains the effect of shunt and of low ventilation-perfusion ratios, which Bohr's own form does not.
/// </remarks>
public sealed class DeadSpaceFractionEnghoff : Definition
{
    private static readonly Slot Expired = new("mixed expired PCO2",
        [
            new Option(Kinds.MixedExpiredCO2, CarbonDioxideSlots.AroundDraw),
            new Option(
                [
                    new Term(Kinds.CO2Production, CarbonDioxideSlots.AroundDraw),
                    new Term(Kinds.MinuteVolumeExpired, CarbonDioxideSlots.AroundDraw),
                    new Term(Kinds.CO2Conversion, new Pairing.Site(TimeSpan.Zero)),
                ],
                Variant: "from-vco2"),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("dead-space-fraction-enghoff", "VDVT", "dead space over tidal volume (Enghoff)", "1", 0.05, 0.95,
        Tolerance.Deviation(0.08, 0, "typical"), [CarbonDioxideSlots.PaCO2, Expired], x => Of(x[CarbonDioxideSlots.PaCO2], MixedExpired(x)));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Ventilation";

    /// <inheritdoc/>
    public override string Summary => "Physiological dead space as a fraction of tidal volume, by the Enghoff equation.";

    /// <inheritdoc/>
    public override string Equation => "VDVT = (PaCO2 − PECO2)/PaCO2, PECO2 measured, else factor·VCO2/VE";

    /// <inheritdoc/>
    public override string Assumptions => "Steady state for 20 to 30 min; expired gas averaged within 5 min of the draw, without bias flow; apparatus dead space not taken off. Constant: 0.863 mm[Hg]·L/mL. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "Includes the effect of shunt. End-tidal is not mixed expired. Falsely high when bias flow dilutes expired gas. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.2, 0.35);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaCO2]) { OnlyWith = [Kinds.MixedExpiredCO2, Kinds.CO2Production] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CommonGates.Ecls with { TrippedBy = [.. Example, ("ecls", "true")] },
        CarbonDioxideGates.NoMask with { TrippedBy = [.. Example, ("support", "non-invasive ventilation")] },
        new Gate(Withheld.ExpiredExceedsArterial, "mixed expired PCO2 is not below PaCO2", [],
            x => x.Has(CarbonDioxideSlots.PaCO2) && x.Has(Expired) && MixedExpired(x) >= x[CarbonDioxideSlots.PaCO2],
            ("PaCO2", 35, "mm[Hg]"), ("PECO2", 38, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<FlagRule> FlagRules => [CommonGates.Settling];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("76002-5", "Physiological dead space/Tidal volume Respiratory system"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Enghoff H. Volumen inefficax. Upsala Läkareförenings Förhandlingar 1938;44:191 (from memory)"),
        new("Tusman G, Sipmann FS, Bohm SH. Rationale of dead space measurement by volumetric capnography. Anesth Analg 2012;114:866, abstract"),
        new("Factor 0.863 = 760·310.15/273.15/1000 mm[Hg]·L/mL (760 mm[Hg], 37 °C, 0 °C): gas laws; West JB. Respiratory Physiology, chapter on ventilation (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "expired gas at half the arterial tension: half of the breath is dead space", 0.5, 1e-9,
            ("PaCO2", 40, "mm[Hg]"), ("PECO2", 20, "mm[Hg]")),
        new(Evidence.Limit, "1000 mL/min of carbon dioxide in 43.15 L/min is 20 mm[Hg], half of 40", 0.5, 1e-9,
            ("PaCO2", 40, "mm[Hg]"), ("VCO2", 1000, "mL/min"), ("VE", 43.15, "L/min"), ("factor", 0.863, "mm[Hg].L/mL")),
    ];

    private static Given[] Example => [("PaCO2", 40, "mm[Hg]"), ("PECO2", 28, "mm[Hg]")];

    /// <summary>Arterial and mixed expired PCO2 in one unit.</summary>
    public static double Of(double arterial, double expired) => (arterial - expired) / arterial;

    private static double MixedExpired(Roots x) => x.Has(Kinds.MixedExpiredCO2)
        ? x[Kinds.MixedExpiredCO2]
        : x[Kinds.CO2Conversion] * x[Kinds.CO2Production] / x[Kinds.MinuteVolumeExpired];
}
