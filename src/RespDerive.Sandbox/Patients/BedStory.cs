using RespDerive.Sandbox.Patients.Charting;
using RespDerive.Sandbox.Patients.Gas;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients;

/// <summary>One patient's course, minute by minute and inside each minute breath by breath.</summary>
internal sealed class BedStory
{
    private readonly Profile _profile;
    private readonly DateTimeOffset _from;
    private readonly Dice _dice;
    private readonly Bed _bed;
    private readonly Chart _chart;
    private readonly Staff _staff;
    private readonly Streams _streams;
    private readonly Holds _holds;
    private readonly BloodGases _gases;
    private readonly GasExchange _gas = new();
    private readonly (double Compliance, double Resistance, double Shunt, double Hemoglobin, double Production) _individual;
    private Instruments _instruments;
    private Ventilation _set;
    private double _trapped;
    private double _wander;
    private double _nextSlip;
    private double? _repairSlip;

    public BedStory(int number, int seed, DateTimeOffset from)
    {
        _profile = Profiles.All[(number - 1) % Profiles.All.Length];
        _dice = new Dice(unchecked((seed * 7919) + (number * 104729)));
        _from = new DateTimeOffset(from.Ticks - (from.Ticks % TimeSpan.TicksPerSecond), from.Offset).AddSeconds(number * 13 % 60);
        _individual = (1 + _dice.Within(0.1), 1 + _dice.Within(0.1), 1 + _dice.Within(0.1), _dice.Within(1), 1 + _dice.Within(0.06));
        _instruments = new Instruments(_dice);
        _bed = new Bed(number, _profile);
        _chart = new Chart(_bed);
        _staff = new Staff(_profile, _dice);
        _streams = new Streams(_chart, _profile.Units, _dice, _profile.MeasuresOxygen);
        _holds = new Holds(_chart, _profile, number, _dice);
        _gases = new BloodGases(_chart, _profile, number, _dice);
        _set = _profile.Start;
        _nextSlip = 0.7 + (1.1 * number);
        Admit();
    }

    public List<ScenarioEvent> Events => _chart.Events;

    public List<Truth> Truths { get; } = [];

    public void Run(TimeSpan duration)
    {
        for (var minute = 0; minute < duration.TotalMinutes; minute++)
        {
            Minute(minute);
        }
    }

    private void Admit()
    {
        // Measured once on admission, within 1 cm.
        foreach (var resource in _bed.Standing(_from.AddHours(-2), _profile.Height + _dice.Within(1)))
        {
            _chart.File(WardEventKind.Standing, _from.AddHours(-2), _from, resource, $"{resource["resourceType"]} {resource["id"]}");
        }
    }

    private void Minute(int minute)
    {
        if (minute > 0 && minute % 1440 == 0)
        {
            _instruments = new Instruments(_dice);
        }
        var hours = minute / 60.0;
        _set = _staff.Attend(hours, _set, _streams.SpO2);
        // Lungs are never quite the same: a slow, small random walk that is drawn back to its course.
        _wander = (0.97 * _wander) + _dice.Normal(0.004);
        var lung = Lung(hours);
        var breath = Breathe(lung);
        var delivered = _instruments.Delivered(_set.FiO2);
        var body = Body(hours);
        _gas.Step(body, delivered, breath.ExpiredVolume * _set.Rate);
        var now = new Moment(_from.AddMinutes(minute), hours, _set, delivered, lung, breath, body, _gas);
        Truths.Add(now.Truth(_bed.Patient, _profile, _staff.LastFiO2Change));
        _streams.Write(now, _instruments);
        _holds.Write(now, _instruments);
        _gases.Write(now, _instruments, _staff.LastChange);
        Slip(now);
    }

    private RespiratorySystem Lung(double hours)
    {
        var lung = _profile.Lung(hours);
        return new RespiratorySystem(lung.Compliance * _individual.Compliance * (1 + _wander), lung.InspiratoryResistance * _individual.Resistance, lung.ExpiratoryResistance * _individual.Resistance);
    }

    private Circulation Body(double hours)
    {
        var body = _profile.Body(hours);
        return body with
        {
            Shunt = body.Shunt * _individual.Shunt * (1 - (2 * _wander)),
            Hemoglobin = body.Hemoglobin + _individual.Hemoglobin,
            CarbonDioxideProduction = body.CarbonDioxideProduction * _individual.Production,
        };
    }

    private Breath Breathe(RespiratorySystem lung)
    {
        var breath = Breath.Of(lung, _set, _trapped);
        for (var i = 1; i < (int)_set.Rate; i++)
        {
            breath = Breath.Of(lung, _set, breath.Trapped);
        }
        _trapped = breath.Trapped;
        return breath;
    }

    // Now and then FiO2 is written down by hand with the wrong unit, and put right half an hour later.
    private void Slip(Moment now)
    {
        if (_repairSlip is { } repair && now.Hours >= repair)
        {
            _repairSlip = null;
            _streams.WriteFiO2ByHand(now.At, _set.FiO2, wrongUnit: false);
        }
        if (now.Hours >= _nextSlip)
        {
            _nextSlip += 8;
            _repairSlip = now.Hours + _dice.Between(0.4, 0.7);
            _streams.WriteFiO2ByHand(now.At, _set.FiO2, wrongUnit: true);
        }
    }
}
