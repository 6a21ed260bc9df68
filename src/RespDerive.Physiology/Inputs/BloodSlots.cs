namespace RespDerive.Physiology.Inputs;

/// <summary>Inputs about blood that several definitions ask for in the same way. The order of options is the order of preference.</summary>
public static class BloodSlots
{
    private static readonly Pairing.SameSample Same = new();
    private static readonly Pairing.Site Constant = new(TimeSpan.Zero);
    private static readonly Pairing.ByHand Hand = new();

    /// <summary>Oxygen tension of a sample whose site does not matter.</summary>
    public static readonly Slot Tension = new("oxygen partial pressure", [new Option(Kinds.PaO2, new Pairing.AnchorItself()), new Option(Kinds.Po2, Hand)]);

    /// <summary>pH of the same sample; by hand the standard one when none is given. A record without pH gives no saturation.</summary>
    public static readonly Slot Ph = new("pH", [new Option(Kinds.PhArterial, Same), new Option(Kinds.StandardPh, Hand)]);

    /// <summary>Carbon dioxide tension of the same sample; by hand the standard one when none is given.</summary>
    public static readonly Slot CarbonDioxide = new("carbon dioxide partial pressure",
        [new Option(Kinds.PaCO2, Same), new Option(Kinds.Pco2, Hand), new Option(Kinds.StandardPco2, Hand)]);

    /// <summary>Temperature the tensions hold at: that of the analyser, 37 °C. A body temperature beside tensions of 37 °C would shift the curve twice.</summary>
    public static readonly Slot Temperature = new(Kinds.GasTemperature, Constant);

    /// <summary>Haemoglobin of the same sample, else the last one of 6 h.</summary>
    public static readonly Slot Hemoglobin = new(Kinds.Hemoglobin.Name,
        [new Option(Kinds.Hemoglobin, Same), new Option(Kinds.Hemoglobin, new Pairing.Nearest(TimeSpan.FromHours(6), TimeSpan.Zero))]);

    /// <summary>Haemoglobin that cannot bind oxygen: measured; what is not measured is taken as none.</summary>
    public static readonly Slot Dyshemoglobin = new("carboxy- and methaemoglobin",
        [
            new Option([new Term(Kinds.Carboxyhemoglobin, Same), new Term(Kinds.Methemoglobin, Same)]),
            Unmeasured(new Term(Kinds.Carboxyhemoglobin, Same)),
            Unmeasured(new Term(Kinds.Methemoglobin, Same)),
            Unmeasured(),
        ]);

    /// <summary>Arterial oxyhaemoglobin: the fraction of a CO-oximeter, else the saturation less what cannot bind oxygen.</summary>
    public static readonly Slot ArterialSaturation = new("arterial oxygen saturation",
        [
            new Option(Kinds.FractionalOxyhemoglobin, Same),
            .. Dyshemoglobin.Options.Select(option => option with { Terms = [new Term(Kinds.SaO2, Same), .. option.Terms] }),
        ]) { Alternatives = true };

    /// <summary>Hüfner number of the definition.</summary>
    public static readonly Slot Huefner = new(Kinds.Huefner, Constant);

    /// <summary>Solubility of the definition.</summary>
    public static readonly Slot Solubility = new(Kinds.OxygenSolubility, Constant);

    private static Option Unmeasured(params Term[] measured) =>
        new([.. measured, new Term(Kinds.NoDyshemoglobin, Constant)], Flags.DyshemoglobinUnknown, Flags.DyshemoglobinUnknown);

    /// <summary>Share of haemoglobin that can bind oxygen.</summary>
    public static double Active(Roots x) => 1 - (x[Dyshemoglobin] / 100);

    /// <summary>Oxygen in blood, mL/dL: huefner·Hb·fraction + alpha·tension.</summary>
    public static double Content(Roots x, double fraction, double tension) =>
        (x[Huefner] * x[Hemoglobin] * fraction) + (x[Solubility] * tension);
}
