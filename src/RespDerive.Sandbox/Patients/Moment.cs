using RespDerive.Sandbox.Patients.Gas;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients;

/// <summary>One minute of one patient: settings, lung, breath and gases as they are.</summary>
internal sealed record Moment(
    DateTimeOffset At, double Hours, Ventilation Set, double FiO2, RespiratorySystem Lung, Breath Breath, Circulation Body, GasExchange Gas)
{
    public Truth Truth(string patient, Profile profile, double hoursOfFiO2Change) => new()
    {
        Patient = patient,
        At = At,
        Passive = Set.Passive,
        Compliance = Lung.Compliance * 1000,
        Resistance = Lung.InspiratoryResistance,
        ExpiratoryTimeConstant = Lung.ExpiratoryTimeConstant,
        Peak = Breath.Peak,
        Plateau = Breath.Plateau,
        Mean = Breath.Mean,
        Peep = Set.Peep,
        TotalPeep = Breath.TotalPeep,
        TidalVolume = Breath.ExpiredVolume,
        Rate = Set.Rate,
        FiO2 = FiO2,
        MinutesSinceFiO2Change = (Hours - hoursOfFiO2Change) * 60,
        PaO2 = Gas.PaO2,
        PaCO2 = Gas.PaCO2,
        Ph = Gas.Ph,
        SaO2 = Gas.SaO2,
        AlveolarPO2 = Gas.AlveolarPO2,
        RespiratoryQuotient = Body.RespiratoryQuotient,
        Barometric = GasExchange.Barometric,
        Shunt = Body.Shunt,
        DeadSpace = Body.DeadSpace,
        Height = profile.Height,
        Gender = profile.Gender,
    };
}
