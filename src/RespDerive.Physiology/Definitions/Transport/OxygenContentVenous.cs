using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen in mixed venous blood, bound and dissolved.</summary>
/// <remarks>
/// CvO2 = huefner·Hb·SvO2·(1 − COHb − MetHb) + alpha·PvO2, of blood from the pulmonary artery; units as for the arterial content.
/// The dissolved part is a hundredth of the whole: a tension that was not measured is taken as 40 ± 15 mm[Hg] and flagged.
/// </remarks>
public sealed class OxygenContentVenous : Definition
{
    private static readonly TimeSpan Near = TimeSpan.FromMinutes(5);

    /// <summary>Central venous saturation fills the place only to be refused by name.</summary>
    private static readonly Slot Saturation = new(Kinds.SvO2.Name, [new Option(Kinds.SvO2, new Pairing.AnchorItself()), new Option(Kinds.ScvO2, new Pairing.ByHand())]) { Alternatives = true };

    private static readonly Slot Tension = new(Kinds.PvO2.Name,
        [
            new Option(Kinds.PvO2, new Pairing.Nearest(Near, Near)),
            new Option(Kinds.VenousTensionGuess, new Pairing.Site(TimeSpan.Zero), Flags.VenousTensionAssumed),
        ]);

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-content-venous", "CvO2", "oxygen content of mixed venous blood", "mL/dL", 1, 35,
        Tolerance.Deviation(0.15, 0, "saturation and tension only: the error of a common haemoglobin is not known of a content given by hand"),
        [BloodSlots.Hemoglobin, Saturation, Tension, BloodSlots.Dyshemoglobin, BloodSlots.Huefner, BloodSlots.Solubility],
        x => BloodSlots.Content(x, x[Saturation] / 100 * BloodSlots.Active(x), x[Tension]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Oxygen content of mixed venous blood: bound to haemoglobin and dissolved.";

    /// <inheritdoc/>
    public override string Equation => "CvO2 = huefner·Hb·SvO2·(1 − COHb − MetHb) + alpha·PvO2";

    /// <inheritdoc/>
    public override string Assumptions => "Blood of the pulmonary artery; haemoglobin of that sample, else of the last 6 h without bleeding or transfusion. Constants 1.34 mL/g and 0.003 mL/dL/mm[Hg] unless given.";

    /// <inheritdoc/>
    public override string Caution => "Central venous blood is no substitute. Rests on the haemoglobin and on the constants shown.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (10, 16);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.SvO2]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        TransportGates.MixedVenous with { TrippedBy = [("Hb", 12, "g/dL"), ("ScvO2", 70, "%"), ("PvO2", 38, "mm[Hg]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("West JB. Respiratory physiology: the essentials, gas transport by the blood (from memory)"),
        new("Hüfner number 1.34 mL/g and solubility 0.003 mL/dL/mm[Hg]: common practice; 1.31 to 1.39 and 0.0031 are also in use"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: mixed venous", 14.19, 0.005, ("Hb", 15, "g/dL"), ("SvO2", 0.7, "1"), ("PvO2", 40, "mm[Hg]")),
    ];
}
