using BenchmarkDotNet.Attributes;
using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks.Stages;

/// <summary>Pairing and evaluating one anchor on a slice of 24 hours.</summary>
public class Evaluate
{
    private readonly Reading[] _readings = [.. Day.Made.Readings];
    private readonly Slice _slice;
    private readonly (Definition Definition, DateTimeOffset At) _ratio;
    private readonly (Definition Definition, DateTimeOffset At) _compliance;

    public Evaluate()
    {
        _slice = new Slice(_readings, Day.Made.Before.Person);
        (_ratio, _compliance) = (Middle("pf-ratio"), Middle("static-compliance"));
    }

    [Benchmark(Description = "P/F ratio")]
    public int Ratio() => One(_ratio);

    [Benchmark(Description = "static compliance")]
    public int Compliance() => One(_compliance);

    [Benchmark(Description = "slice of 24 h, made")]
    public Slice Slice() => new(_readings, Day.Made.Before.Person);

    private int One((Definition Definition, DateTimeOffset At) anchor) => Ward.Site.Evaluator.Evaluate(anchor.Definition, _slice, anchor.At, anchor.At).Count;

    /// <summary>An anchor in the middle of the day that has a value: a withheld one costs less.</summary>
    private (Definition, DateTimeOffset) Middle(string key)
    {
        var definition = Catalogue.Shipped.Find(key)!;
        var valued = Ward.Site.Evaluator.Evaluate(definition, _slice, Ward.Start, Ward.Start.AddHours(24)).Where(outcome => outcome.Withheld is null).ToArray();
        return (definition, valued[valued.Length / 2].At);
    }
}
