using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients;

/// <summary>Those who change the settings: a plan, and FiO2 by the oximeter about once an hour.</summary>
internal sealed class Staff(Profile profile, Dice dice)
{
    private readonly Queue<(double Hours, PlannedStep Step)> _plan = new(profile.Plan.Select(s => (s.Hours + dice.Within(0.2), s)));
    private double _nextRound = dice.Between(0.9, 1.3);

    /// <summary>Hours of the last change of any setting; the start counts.</summary>
    public double LastChange { get; private set; }

    /// <summary>Hours of the last change of FiO2.</summary>
    public double LastFiO2Change { get; private set; }

    public Ventilation Attend(double hours, Ventilation set, double? spo2)
    {
        var next = set;
        while (_plan.TryPeek(out var planned) && planned.Hours <= hours)
        {
            next = _plan.Dequeue().Step.Change(next);
        }
        if (hours >= _nextRound && spo2 is { } seen)
        {
            _nextRound = hours + dice.Between(0.9, 1.4);
            next = next with { FiO2 = Titrated(next.FiO2, seen) };
        }
        if (next != set)
        {
            LastChange = hours;
        }
        if (next.FiO2 != set.FiO2)
        {
            LastFiO2Change = hours;
        }
        return next;
    }

    private double Titrated(double fio2, double spo2) => Math.Round(
        spo2 < profile.SpO2Target.Low ? Math.Min(1, fio2 + 0.10)
        : spo2 > profile.SpO2Target.High && fio2 > 0.30 ? Math.Max(0.30, fio2 - 0.05)
        : fio2, 2);
}
