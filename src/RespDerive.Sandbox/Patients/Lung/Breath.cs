namespace RespDerive.Sandbox.Patients.Lung;

/// <summary>
/// One breath, in closed form. Volumes are above the relaxed volume at set PEEP, so the alveolar pressure is
/// PEEP + V/C; what is not expired in time stays as trapped volume and is the next breath's intrinsic PEEP.
/// </summary>
/// <param name="Peak">Highest airway pressure, cm[H2O].</param>
/// <param name="Plateau">Airway pressure in an inspiratory hold (zero flow), cm[H2O].</param>
/// <param name="Mean">Airway pressure over the whole cycle, cm[H2O].</param>
/// <param name="TotalPeep">Airway pressure in an expiratory hold after this breath, cm[H2O].</param>
/// <param name="ExpiredVolume">L.</param>
/// <param name="Trapped">Volume left at end expiration, L.</param>
internal readonly record struct Breath(double Peak, double Plateau, double Mean, double TotalPeep, double ExpiredVolume, double Trapped)
{
    public static Breath Of(RespiratorySystem lung, Ventilation set, double trapped) =>
        set.Mode == BreathMode.VolumeControlled ? ConstantFlow(lung, set, trapped) : ConstantPressure(lung, set, trapped);

    /// <summary>Volume that is left of <paramref name="start"/> after passive expiration for a time, L.</summary>
    public static double AfterExpiration(RespiratorySystem lung, double start, double seconds) =>
        start * Math.Exp(-seconds / lung.ExpiratoryTimeConstant);

    /// <summary>The breath that repeats itself under constant settings.</summary>
    public static Breath Steady(RespiratorySystem lung, Ventilation set)
    {
        var breath = Of(lung, set, 0);
        for (var i = 0; i < 200; i++)
        {
            breath = Of(lung, set, breath.Trapped);
        }
        return breath;
    }

    private static Breath ConstantFlow(RespiratorySystem lung, Ventilation set, double trapped)
    {
        var inspiration = set.TidalVolume / set.Flow;
        var end = trapped + set.TidalVolume;
        var resistive = lung.InspiratoryResistance * set.Flow;
        var area = inspiration * (((trapped + end) / 2 / lung.Compliance) + resistive);
        return Finish(lung, set, end, inspiration, set.Peep + (end / lung.Compliance) + resistive, area);
    }

    private static Breath ConstantPressure(RespiratorySystem lung, Ventilation set, double trapped)
    {
        var equilibrium = lung.Compliance * (set.InspiratoryPressure + set.Effort);
        var end = equilibrium + ((trapped - equilibrium) * Math.Exp(-set.InspiratoryTime / lung.InspiratoryTimeConstant));
        return Finish(lung, set, end, set.InspiratoryTime, set.Peep + set.InspiratoryPressure, set.InspiratoryTime * set.InspiratoryPressure);
    }

    // During expiration the airway opening is at set PEEP, so only inspiration adds to the mean above it.
    private static Breath Finish(RespiratorySystem lung, Ventilation set, double end, double inspiration, double peak, double areaAbovePeep)
    {
        var left = AfterExpiration(lung, end, set.Cycle - inspiration);
        return new Breath(peak, set.Peep + (end / lung.Compliance), set.Peep + (areaAbovePeep / set.Cycle), set.Peep + (left / lung.Compliance), end - left, left);
    }
}
