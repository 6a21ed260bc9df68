using BenchmarkDotNet.Attributes;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks.Stages;

/// <summary>A whole turn on a day of one patient, held in memory and searched without an index.</summary>
public class TurnInMemory
{
    [Benchmark(Description = "turn, a minute of the devices")]
    public TurnChanges Minute() => Turn.Run(Ward.Site.Evaluator, Day.Made.Before, Day.Made.Minute, null);

    [Benchmark(Description = "turn, a blood gas")]
    public TurnChanges Gas() => Turn.Run(Ward.Site.Evaluator, Day.Made.Before, Day.Made.Gas, null);
}
