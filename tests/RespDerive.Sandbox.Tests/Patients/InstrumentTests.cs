using RespDerive.Sandbox.Patients;

namespace RespDerive.Sandbox.Tests.Patients;

/// <summary>What is reported against what is true: inside the stated limits, and using them.</summary>
public sealed class InstrumentTests
{
    private static readonly DateTimeOffset s_from = new(2026, 1, 2, 6, 0, 0, TimeSpan.Zero);
    private static readonly Scenario[] s_wards = [.. Enumerable.Range(1, 12).Select(seed => Scenario.Play(seed, s_from, TimeSpan.FromHours(5)))];

    // Limits of ISO 80601-2-12 and ISO 80601-2-55, from memory; half a last digit is added for rounding.
    [Theory]
    [InlineData("76007-4", 0.004, 0.15, 0.0005)]
    [InlineData("60951-1", 2, 0.04, 0.06)]
    [InlineData("76530-5", 2, 0.04, 0.06)]
    [InlineData("76248-4", 2, 0.04, 0.06)]
    [InlineData("76247-6", 2, 0.04, 0.06)]
    [InlineData("71835-3", 0.025, 0.025, 0.0006)]
    [InlineData("19996-8", 0.025, 0.025, 0.0006)]
    [InlineData("19840-8", 1, 0, 0.51)]
    public void Readings_stay_within_the_limits_and_use_them(string loinc, double constant, double part, double rounding)
    {
        var errors = Pairs(loinc).Select(p => (Error: p.Read - p.True, Limit: constant + (part * p.True))).ToList();
        Assert.All(errors, e => Assert.True(Math.Abs(e.Error) <= e.Limit + rounding, $"{loinc}: {e.Error} beyond {e.Limit}"));
        // A rectangular error has a standard deviation of limit/√3; one constant draw per bed and day makes it noisy.
        Assert.InRange(Math.Sqrt(errors.Average(e => e.Error * e.Error / (e.Limit * e.Limit))), 0.35, 0.80);
    }

    [Theory]
    [InlineData("2703-7", 0.05)]
    [InlineData("2019-8", 0.025)]
    public void Gas_results_scatter_as_stated(string loinc, double relative)
    {
        var z = Pairs(loinc).Select(p => (p.Read - p.True) / Math.Max(loinc == "2019-8" ? 1 : 0, relative * p.True)).ToList();
        Assert.True(z.Count > 30);
        Assert.InRange(z.Average(), -0.45, 0.45);
        Assert.InRange(Math.Sqrt(z.Average(x => x * x)), 0.7, 1.3);
    }

    // Plateau and total PEEP of one hold share the transducer's zero: it cancels in their difference.
    [Fact]
    public void The_zero_offset_cancels_in_the_driving_pressure()
    {
        var plateaus = Pairs("76259-1").Where(p => !p.Withdrawn).ToDictionary(p => p.Key);
        var peeps = Pairs("76247-6").Where(p => plateaus.ContainsKey(p.Key)).ToList();
        Assert.NotEmpty(peeps);
        Assert.All(peeps, peep =>
        {
            var plateau = plateaus[peep.Key];
            var error = plateau.Read - peep.Read - (plateau.True - peep.True);
            Assert.True(Math.Abs(error) <= (0.04 * (plateau.True + peep.True)) + 0.12, $"{error}");
        });
    }

    private sealed record Pair((int Ward, string Patient, DateTimeOffset At) Key, double Read, double True, bool Withdrawn);

    private static IEnumerable<Pair> Pairs(string loinc)
    {
        for (var ward = 0; ward < s_wards.Length; ward++)
        {
            var truths = s_wards[ward].Truths.ToDictionary(t => (t.Patient, t.At));
            var spoiled = s_wards[ward].Events.Where(e => e.Kind is WardEventKind.Correction or WardEventKind.Withdrawal).Select(e => e.Id).ToHashSet();
            foreach (var e in s_wards[ward].Events)
            {
                // Filed late by up to 85 min, a spoiled result may be put right only after the end: take those with time to spare.
                if (e.Kind is WardEventKind.Measurement or WardEventKind.Hold or WardEventKind.BloodGas && ScenarioTests.Code(e.Json) == loinc
                    && e.EventTime < s_from.AddHours(3.5) && ScenarioTests.Value(e.Json) is var (number, unit) && truths.TryGetValue((e.Patient, e.EventTime), out var truth))
                {
                    var withdrawn = spoiled.Contains(e.Id);
                    if (!withdrawn || loinc == "76259-1")
                    {
                        yield return new Pair((ward, e.Patient, e.EventTime), Canonical(number, unit), True(truth, loinc), withdrawn);
                    }
                }
            }
        }
    }

    // Exact factors: 1 kPa = 7.50062 mm[Hg] (conventional 133.322 Pa), 1 mbar = 1/0.980665 cm[H2O] (conventional).
    private static double Canonical(double number, string unit) => unit switch
    {
        "kPa" => number * 7.500616827,
        "mbar" => number / 0.980665,
        "mL" => number / 1000,
        "%" => number / 100,
        _ => number,
    };

    private static double True(Truth t, string loinc) => loinc switch
    {
        "76007-4" => t.TidalVolume,
        "60951-1" => t.Peak,
        "76530-5" => t.Mean,
        "76248-4" => t.Peep,
        "76247-6" => t.TotalPeep,
        "76259-1" => t.Plateau,
        "71835-3" or "19996-8" => t.FiO2,
        "19840-8" => t.Rate,
        "2703-7" => t.PaO2,
        _ => t.PaCO2,
    };
}
