using BenchmarkDotNet.Columns;
using BenchmarkDotNet.Configs;
using BenchmarkDotNet.Diagnosers;
using BenchmarkDotNet.Jobs;
using BenchmarkDotNet.Loggers;
using BenchmarkDotNet.Toolchains.InProcess.Emit;
using Perfolizer.Horology;

namespace RespDerive.Benchmarks;

/// <summary>Marks a stage that waits for the disk, so that processor time says nothing about it.</summary>
[AttributeUsage(AttributeTargets.Class)]
internal sealed class WaitsForDiskAttribute : Attribute;

/// <summary>A short job in this process: quick by hand, and nothing is built anew. The full log is under BenchmarkDotNet.Artifacts.</summary>
internal static class Measuring
{
    public static IConfig Of(Type stage)
    {
        var job = Job.Default.WithToolchain(InProcessEmitToolchain.Instance)
            .WithWarmupCount(6).WithIterationCount(9).WithIterationTime(TimeInterval.FromMilliseconds(150));
        return ManualConfig.CreateEmpty()
            .AddJob(Attribute.IsDefined(stage, typeof(WaitsForDiskAttribute)) ? job : job.WithClock(new ProcessorTime()))
            .AddColumnProvider(DefaultColumnProviders.Instance)
            .AddDiagnoser(MemoryDiagnoser.Default)
            .AddLogger(NullLogger.Instance)
            .WithOptions(ConfigOptions.DisableOptimizationsValidator);
    }

    /// <summary>Processor time of the process, since wall time on a shared machine tells of its neighbours.</summary>
    private sealed class ProcessorTime : IClock
    {
        public string Title => "processor time";

        public bool IsAvailable => true;

        public Frequency Frequency => new(TimeSpan.TicksPerSecond);

        public long GetTimestamp() => Environment.CpuUsage.TotalTime.Ticks;
    }
}
