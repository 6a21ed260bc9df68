using BenchmarkDotNet.Attributes;
using RespDerive.Physiology;

namespace RespDerive.Benchmarks;

/// <summary>One evaluation with its uncertainty in a place that is used again and again, for each definition on its first worked example.</summary>
[MemoryDiagnoser]
public class ComputationBenchmarks
{
    private readonly Evaluation _evaluation = new();
    private readonly Roots _reused = new();
    private Definition _definition = null!;
    private Roots _roots = null!;

    public static IEnumerable<string> Definitions => Catalogue.Shipped.All.Select(definition => definition.Key);

    [ParamsSource(nameof(Definitions))]
    public string Key { get; set; } = "";

    [GlobalSetup]
    public void SetUp()
    {
        _definition = Catalogue.Shipped.Find(Key)!;
        _roots = new Roots(ByHand.Compute(_definition, _definition.Vectors[0].Inputs).Inputs.Select(input => new Root(input.Kind, input.Value, Assumed: input.Assumed)));
    }

    /// <summary>On roots that stand ready.</summary>
    [Benchmark]
    public double Evaluate()
    {
        _evaluation.Run(_definition, _roots);
        return _evaluation.Uncertainty;
    }

    /// <summary>With the roots put in anew, as for the next reading.</summary>
    [Benchmark]
    public double FillAndEvaluate()
    {
        _reused.Clear();
        for (var i = 0; i < _roots.All.Count; i++)
        {
            _reused.Add(_roots.All[i]);
        }

        _evaluation.Run(_definition, _reused);
        return _evaluation.Uncertainty;
    }
}
