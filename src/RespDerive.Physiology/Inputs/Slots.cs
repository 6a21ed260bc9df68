namespace RespDerive.Physiology.Inputs;

/// <summary>Inputs that several definitions ask for in the same way. The order of options is the order of preference.</summary>
public static class Slots
{
    private static readonly TimeSpan FiveMinutes = TimeSpan.FromMinutes(5);
    private static readonly Pairing.Nearest Near = new(FiveMinutes, FiveMinutes);
    private static readonly Pairing.SameManoeuvre SameBreath = new(TimeSpan.FromMinutes(2));

    /// <summary>The anchor of gas-exchange values; a sample of unstated site counts only when it is known to be arterial.</summary>
    public static readonly Slot PaO2 = new(Kinds.PaO2.Name,
        [new Option(Kinds.PaO2, new Pairing.AnchorItself()), new Option(Kinds.Po2, new Pairing.ByHand())]);

    /// <summary>PaCO2 of the same sample.</summary>
    public static readonly Slot PaCO2 = new(Kinds.PaCO2, new Pairing.SameSample());

    /// <summary>Delivered oxygen fraction: measured over set, and never older than the last change of the setting.</summary>
    public static readonly Slot FiO2 = new(Kinds.FiO2.Name,
        [
            new Option(Kinds.FiO2Measured, new Pairing.SinceChange(FiveMinutes, [Kinds.FiO2Set, Kinds.FiO2])),
            new Option([new Term([Kinds.FiO2Set, Kinds.FiO2], new Pairing.InForce())]),
        ]);

    /// <summary>End-expiratory pressure for mechanics: total over its sum over measured over set.</summary>
    public static readonly Slot Peep = new("total PEEP",
        [
            new Option(Kinds.PeepTotal, new Pairing.SameManoeuvre(FiveMinutes)),
            new Option([new Term(Kinds.PeepSet, new Pairing.InForce()), new Term(Kinds.PeepIntrinsic, Near)]),
            new Option([new Term(Kinds.Peep, Near), new Term(Kinds.PeepIntrinsic, Near)]),
            new Option(Kinds.Peep, Near, Flags.PeepNotTotal, "peep-not-total"),
            new Option(Kinds.PeepSet, new Pairing.InForce(), Flags.PeepNotTotal, "peep-not-total"),
        ]);

    /// <summary>Plateau pressure of an end-inspiratory hold.</summary>
    public static readonly Slot Plateau = new(Kinds.Plateau, new Pairing.AnchorItself(), Withheld.NoPlateau);

    /// <summary>Tidal volume of the same breath, expired over delivered.</summary>
    public static readonly Slot TidalVolume = new("tidal volume",
        [new Option(Kinds.TidalVolumeExpired, SameBreath), new Option(Kinds.TidalVolume, SameBreath)]);

    /// <summary>Tidal volume as the anchor itself.</summary>
    public static readonly Slot TidalVolumeAnchor = new("tidal volume",
        [new Option(Kinds.TidalVolumeExpired, new Pairing.AnchorItself()), new Option(Kinds.TidalVolume, new Pairing.AnchorItself())]);

    /// <summary>Total breath rate near the anchor.</summary>
    public static readonly Slot Rate = new(Kinds.RateTotal, new Pairing.Nearest(TimeSpan.FromMinutes(2), TimeSpan.FromMinutes(2)));

    /// <summary>Peak pressure of the breath whose plateau is the anchor.</summary>
    public static readonly Slot Peak = new(Kinds.Peak, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(1)));

    /// <summary>Constant of the published formulas of mechanical power.</summary>
    public static readonly Slot PrintedWorkFactor = new(Kinds.PrintedWorkFactor, new Pairing.Site(TimeSpan.Zero));

    /// <summary>
    /// Evidence that the mode is the one a formula is made for; a gate judges which mode it is.
    /// From the record nothing is taken for granted; by hand the mode is assumed unless it is given, and stands in the result as assumed.
    /// </summary>
    public static Slot ModeKnown(string missing) => new(Kinds.Mode.Name,
        [new Option(Kinds.Mode, new Pairing.InForce()), new Option(Kinds.ModeTaken, new Pairing.ByHand(), Flags.ModeUnconfirmed)], missing);

    /// <summary>Station pressure: site policy, else a reading of the last 6 h; never assumed.</summary>
    public static readonly Slot BarometricPressure = new(Kinds.BarometricPressure, new Pairing.Site(TimeSpan.FromHours(6)), Withheld.PressureUnknown);

    /// <summary>Vapour pressure at 37 °C.</summary>
    public static readonly Slot WaterVapour = new(Kinds.WaterVapour, new Pairing.Site(TimeSpan.Zero));

    /// <summary>Respiratory exchange ratio of the site policy.</summary>
    public static readonly Slot RespiratoryQuotient = new(Kinds.RespiratoryQuotient, new Pairing.Site(TimeSpan.Zero));

    /// <summary>A setting or measurement that shows the patient is ventilated.</summary>
    public static readonly IReadOnlyList<Kind> Ventilated =
    [
        Kinds.TidalVolumeSet, Kinds.RateSet, Kinds.PeepSet, Kinds.FiO2Set, Kinds.PressureSupportSet, Kinds.FlowSet, Kinds.Mode,
        Kinds.TidalVolumeExpired, Kinds.MinuteVolumeExpired, Kinds.RateTotal, Kinds.Plateau, Kinds.Peak, Kinds.MeanAirway, Kinds.Peep, Kinds.PeepTotal,
    ];
}
