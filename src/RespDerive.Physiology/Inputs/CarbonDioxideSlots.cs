using RespDerive.Physiology.Definitions;

namespace RespDerive.Physiology.Inputs;

/// <summary>Inputs that values of carbon dioxide, acid and base ask for in the same way.</summary>
public static class CarbonDioxideSlots
{
    private static readonly TimeSpan FiveMinutes = TimeSpan.FromMinutes(5);
    private static readonly TimeSpan QuarterHour = TimeSpan.FromMinutes(15);

    /// <summary>Expired gas is averaged around the draw.</summary>
    public static readonly Pairing AroundDraw = new Pairing.MedianOver(FiveMinutes, FiveMinutes, 1);

    /// <summary>PaCO2 as the anchor.</summary>
    public static readonly Slot PaCO2 = new(Kinds.PaCO2, new Pairing.AnchorItself());

    /// <summary>Measured carbon dioxide production around the draw.</summary>
    public static readonly Slot Production = new(Kinds.CO2Production, AroundDraw);

    /// <summary>The factor between STPD volumes, BTPS volumes and tension.</summary>
    public static readonly Slot Conversion = new(Kinds.CO2Conversion, new Pairing.Site(TimeSpan.Zero));

    /// <summary>Ventilation before the draw: measured expired minute volume over tidal volume times rate.</summary>
    public static readonly Slot Ventilation = new("minute ventilation",
        [
            new Option(Kinds.MinuteVolumeExpired, new Pairing.MedianOver(QuarterHour, TimeSpan.Zero, 1)),
            new Option(MinuteVentilation.Value, new Pairing.Nearest(QuarterHour, TimeSpan.Zero)),
        ]);

    /// <summary>The tension aimed at; only by hand.</summary>
    public static readonly Slot Target = new(Kinds.PaCO2Target, new Pairing.ByHand());

    /// <summary>pH as the anchor of acid-base values.</summary>
    public static readonly Slot Ph = new(Kinds.PhArterial, new Pairing.AnchorItself());

    /// <summary>Body temperature of the hour before the draw.</summary>
    public static readonly Slot Temperature = new(Kinds.BodyTemperature, new Pairing.Nearest(TimeSpan.FromHours(1), TimeSpan.Zero));
}
