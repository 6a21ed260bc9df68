namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>
/// About once an hour, inspiratory and expiratory hold on a passive patient. Where the ventilator does not send
/// them, a person writes them down some minutes later, and sometimes mistypes.
/// </summary>
internal sealed class Holds(Chart chart, Profile profile, int bedNumber, Dice dice)
{
    private double _due = dice.Between(0.3, 0.7);
    private int _count;

    public void Write(Moment now, Instruments with)
    {
        if (now.Hours < _due || !now.Set.Passive)
        {
            return;
        }
        _due = now.Hours + dice.Between(0.85, 1.2);
        _count++;
        var device = profile.HoldsFromDevice ? chart.Bed.Ventilator : null;
        var filed = now.At.AddSeconds(profile.HoldsFromDevice ? 5 : dice.Between(120, 480));
        var mistyped = !profile.HoldsFromDevice && (_count + bedNumber) % 7 == 4;
        var plateau = with.Pressure(now.Breath.Plateau) + (mistyped ? 20 : 0);
        var observation = chart.Bed.Observation(chart.NextId("plateau"), Codes.Plateau, now.At, profile.Units.Pressure(plateau), device);
        chart.File(WardEventKind.Hold, now.At, filed, Codes.Plateau, observation);
        if (mistyped)
        {
            chart.Withdraw(now.At, filed.AddMinutes(dice.Between(15, 40)), Codes.Plateau, observation);
        }
        // Where intrinsic PEEP is not expected, the expiratory hold is often left out.
        if (profile.Grouping != Grouping.Panel || dice.Chance(0.5))
        {
            chart.File(WardEventKind.Hold, now.At, filed, Codes.TotalPeep,
                chart.Bed.Observation(chart.NextId("peep-total"), Codes.TotalPeep, now.At, profile.Units.Pressure(with.Pressure(now.Breath.TotalPeep)), device));
        }
    }
}
