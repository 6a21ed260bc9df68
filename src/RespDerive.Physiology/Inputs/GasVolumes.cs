namespace RespDerive.Physiology.Inputs;

/// <summary>Gas volumes between the conditions they are stated in.</summary>
public static class GasVolumes
{
    /// <summary>Melting point of water in K; STPD is dry gas at this temperature and 760 mm[Hg].</summary>
    private const double Zero = 273.15;

    /// <summary>Factor from a saturated volume at body temperature and ambient pressure (BTPS) to dry gas at 0 °C and 760 mm[Hg] (STPD).</summary>
    /// <remarks>(PB − PH2O)/760 · 273.15/(273.15 + t), the laws of Boyle, Charles and Dalton.</remarks>
    /// <param name="barometric">Ambient pressure, mm[Hg].</param>
    /// <param name="vapour">Water vapour pressure at that temperature, mm[Hg].</param>
    /// <param name="celsius">Temperature of the saturated gas, °C.</param>
    public static double BtpsToStpd(double barometric, double vapour, double celsius) => (barometric - vapour) / 760 * Zero / (Zero + celsius);
}
