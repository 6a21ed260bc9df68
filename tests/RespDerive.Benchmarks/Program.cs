using BenchmarkDotNet.Running;
using RespDerive.Benchmarks;
using RespDerive.Benchmarks.EndToEnd;
using RespDerive.Benchmarks.Stages;

// "end-to-end [seconds [rounds]]" loads a whole service; any other words choose stages by name; none: all stages but the long one,
// which takes every definition of the catalogue by itself.
if (args is ["end-to-end", .. var figures])
{
    await Comparison.RunAsync(figures);
    return;
}

Type[] stages = [typeof(Read), typeof(Evaluate), typeof(TurnInMemory), typeof(TurnFromStore), typeof(Compute), typeof(Commit), typeof(Render)];
Console.WriteLine(Machine.Line());
Table.Head();
Type[] named = args.Length == 0 ? stages : [.. stages, typeof(ComputationBenchmarks)];
foreach (var stage in named.Where(stage => args.Length == 0 || args.Any(word => stage.Name.Contains(word, StringComparison.OrdinalIgnoreCase))))
{
    Table.Rows(BenchmarkRunner.Run(stage, Measuring.Of(stage)));
}

Console.WriteLine(Machine.Line());
