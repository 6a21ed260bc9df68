using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Oxygen in arterial blood, bound and dissolved.</summary>
/// <remarks>
/// CaO2 = huefner·Hb·S + alpha·PaO2: huefner 1.34 mL/g, Hb in g/dL, S the fraction of all haemoglobin that carries oxygen, alpha 0.003 mL/dL/mm[Hg].
/// S is the oxyhaemoglobin of a CO-oximeter, else the saturation times (1 − COHb − MetHb). By hand also of other blood; the variant then says which.
/// </remarks>
public sealed class OxygenContent : Definition
{
    private static readonly Pairing.ByHand Hand = new();

    private static readonly Slot OtherSaturation = new("oxygen saturation",
        [
            new Option(Kinds.So2, Hand, null, "site-unspecified"),
            new Option(Kinds.SvO2, Hand, null, "mixed-venous"),
            new Option(Kinds.EndCapillarySaturation, Hand, null, "end-capillary"),
        ]) { Alternatives = true };

    private static readonly Slot OtherTension = new("oxygen partial pressure",
        [new Option(Kinds.Po2, Hand), new Option(Kinds.PvO2, Hand), new Option(AlveolarPo2.Value, Hand)]) { Alternatives = true };

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-content", "CaO2", "oxygen content of arterial blood", "mL/dL", 1, 35,
        Tolerance.Deviation(0.15, 0, "saturation and tension only: the error of a common haemoglobin is not known of a content given by hand"),
        [BloodSlots.Hemoglobin, BloodSlots.ArterialSaturation, Slots.PaO2, BloodSlots.Huefner, BloodSlots.Solubility], Compute);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Oxygen content of arterial blood: bound to haemoglobin and dissolved; by hand of any blood.";

    /// <inheritdoc/>
    public override string Equation => "CaO2 = huefner·Hb·S + alpha·PaO2";

    /// <inheritdoc/>
    public override string Assumptions => "Tension and saturation of one sample; haemoglobin of that sample, else of the last 6 h without bleeding or transfusion. Constants 1.34 mL/g and 0.003 mL/dL/mm[Hg] unless given. Fractional oxyhaemoglobin is never reduced by COHb and MetHb again.";

    /// <inheritdoc/>
    public override string Caution => "Rests on the haemoglobin and on the constants shown; never from a pulse oximeter. Not a reason by itself to transfuse.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (14, 21);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.SaO2, Kinds.FractionalOxyhemoglobin] };

    /// <inheritdoc/>
    public override IReadOnlyList<Slot> ByIdentity => [BloodSlots.Hemoglobin, OtherSaturation, OtherTension, BloodSlots.Dyshemoglobin, BloodSlots.Huefner, BloodSlots.Solubility];

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.NotArterial, "the sample is not arterial", [Kinds.Sample], x => x.Has(Kinds.PaO2) && x.Has(Kinds.Sample) && x.Code(Kinds.Sample) != "arterial",
            ("Hb", 12, "g/dL"), ("SaO2", 70, "%"), ("PaO2", 40, "mm[Hg]"), ("sample", "venous")),
        new Gate(Withheld.DifferentBlood, "the saturation and the tension are not of the same blood", [], Mixed,
            ("Hb", 12, "g/dL"), ("SvO2", 70, "%"), ("PAO2", 100, "mm[Hg]")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes => [StandardCode.Loinc("59274-1", "Oxygen content in Arterial blood by calculation")];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("West JB. Respiratory physiology: the essentials, gas transport by the blood (from memory)"),
        new("Hüfner number 1.34 mL/g and solubility 0.003 mL/dL/mm[Hg]: common practice; 1.31 to 1.39 and 0.0031 are also in use"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: arterial", 19.36, 0.01, ("Hb", 15, "g/dL"), ("SaO2", 0.95, "1"), ("PaO2", 90, "mm[Hg]"), ("huefner", 1.34, "mL/g"), ("alpha", 0.003, "mL/dL/mm[Hg]")),
        new(Evidence.Published, "Community College of Philadelphia, course 210, shunt equation problems: mixed venous", 14.19, 0.005, ("Hb", 15, "g/dL"), ("SvO2", 0.7, "1"), ("PvO2", 40, "mm[Hg]"), ("huefner", 1.34, "mL/g"), ("alpha", 0.003, "mL/dL/mm[Hg]")),
        new(Evidence.Published, "calculation of oxygen delivery, 70 kg man, table in a postgraduate medical journal", 19.4, 0.05, ("Hb", 14, "g/dL"), ("SaO2", 0.98, "1"), ("PaO2", 13.3, "kPa"), ("huefner", 1.39, "mL/g"), ("alpha", 0.0225, "mL/dL/kPa")),
        new(Evidence.Limit, "a tenth of the haemoglobin that cannot bind takes a tenth of the bound oxygen: 1.34·10·1·0.9 + 0.003·100", 12.36, 1e-9, ("Hb", 10, "g/dL"), ("SaO2", 100, "%"), ("COHb", 8, "%"), ("MetHb", 2, "%"), ("PaO2", 100, "mm[Hg]")),
    ];

    /// <summary>Arterial oxyhaemoglobin as a fraction of all haemoglobin.</summary>
    internal static double Fraction(Roots x) => x.Has(Kinds.FractionalOxyhemoglobin)
        ? x[Kinds.FractionalOxyhemoglobin] / 100
        : x[Kinds.SaO2] / 100 * BloodSlots.Active(x);

    private static double Compute(Roots x) => x.Has(BloodSlots.ArterialSaturation) && x.Has(Slots.PaO2)
        ? BloodSlots.Content(x, Fraction(x), x[Slots.PaO2])
        : BloodSlots.Content(x, x[OtherSaturation] / 100 * BloodSlots.Active(x), x[OtherTension]);

    private static bool Mixed(Roots x) => !(x.Has(BloodSlots.ArterialSaturation) && x.Has(Slots.PaO2))
        && x.Chosen(OtherSaturation) is { } saturation && x.Chosen(OtherTension) is { } tension
        && Place(OtherSaturation, saturation) != Place(OtherTension, tension);

    /// <summary>Options of both slots stand in the order unspecified, mixed venous, end-capillary.</summary>
    private static int Place(Slot slot, Option option)
    {
        var place = 0;
        while (!ReferenceEquals(slot.Options[place], option))
        {
            place++;
        }

        return place;
    }
}
