namespace RespDerive.Sandbox.Patients.Gas;

/// <summary>True gases of one patient. CO2 follows alveolar ventilation slowly, oxygen follows FiO2 within minutes.</summary>
internal sealed class GasExchange
{
    /// <summary>Barometric pressure on the ward, mm[Hg].</summary>
    public const double Barometric = 760;

    private const double WaterVapour = 47;
    private const double CarbonDioxideMinutes = 12;
    private double? _fractionInLung;
    private double _paco2;

    public double PaCO2 => _paco2;
    public double PaO2 { get; private set; }
    public double AlveolarPO2 { get; private set; }
    public double Ph { get; private set; }
    public double SaO2 => Dissociation.Saturation(PaO2, Ph);
    public double MixedVenousPO2 { get; private set; }

    /// <summary>
    /// Alveolar gas equation in its full form (Fenn, Rahn and Otis 1946), mm[Hg]:
    /// PAO2 = FiO2·(PB − PH2O) − PaCO2·(FiO2 + (1 − FiO2)/R).
    /// </summary>
    public static double Alveolar(double fio2, double paco2, double quotient) =>
        (fio2 * (Barometric - WaterVapour)) - (paco2 * (fio2 + ((1 - fio2) / quotient)));

    /// <summary>PaCO2 at which CO2 output equals production: 0.863·V̇CO2/V̇A (V̇CO2 mL/min STPD, V̇A L/min BTPS).</summary>
    public static double SteadyPaCO2(Circulation body, double minuteVolume) =>
        0.863 * body.CarbonDioxideProduction / (minuteVolume * (1 - body.DeadSpace));

    /// <summary>Moves on by one minute of breathing this FiO2 at this minute volume (L/min).</summary>
    public void Step(Circulation body, double fio2, double minuteVolume)
    {
        var steady = SteadyPaCO2(body, minuteVolume);
        var fraction = _fractionInLung is { } before ? Approach(before, fio2, body.WashIn) : fio2;
        _paco2 = _fractionInLung is null ? steady : Approach(_paco2, steady, CarbonDioxideMinutes);
        _fractionInLung = fraction;
        // Acute buffering: about 1 mmol/L per 10 mm[Hg] (common practice, no single source).
        Ph = 6.1 + Math.Log10((body.Bicarbonate + ((_paco2 - 40) / 10)) / (0.0307 * _paco2));
        AlveolarPO2 = Alveolar(fraction, _paco2, body.RespiratoryQuotient);
        // Shunt equation with the Fick principle: Ca = Cc' − Qs/Qt / (1 − Qs/Qt) · V̇O2/Q̇.
        var difference = body.CarbonDioxideProduction / body.RespiratoryQuotient / (10 * body.CardiacOutput);
        var capillary = Dissociation.Content(AlveolarPO2, Ph, body.Hemoglobin);
        var arterial = capillary - (body.Shunt / (1 - body.Shunt) * difference);
        PaO2 = Dissociation.Pressure(arterial, Ph, body.Hemoglobin);
        MixedVenousPO2 = Dissociation.Pressure(arterial - difference, Ph - 0.03, body.Hemoglobin);
    }

    private static double Approach(double from, double to, double minutes) => to + ((from - to) * Math.Exp(-1 / minutes));
}
