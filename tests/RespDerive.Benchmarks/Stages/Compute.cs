using BenchmarkDotNet.Attributes;
using RespDerive.Physiology;

namespace RespDerive.Benchmarks.Stages;

/// <summary>The bare number with its uncertainty, for each definition on one of its own worked examples.</summary>
public class Compute
{
    private Definition _definition = null!;
    private Roots _roots = null!;

    public static IEnumerable<string> Definitions => Catalogue.Shipped.All.Select(definition => definition.Key);

    [ParamsSource(nameof(Definitions))]
    public string Key { get; set; } = "";

    [GlobalSetup]
    public void SetUp()
    {
        _definition = Catalogue.Shipped.Find(Key)!;
        _roots = _definition.Vectors.Select(vector => ByHand.Compute(_definition, vector.Inputs)).Where(example => example.Computation.Withheld is null)
            .Select(example => new Roots(example.Inputs.Select(input => new Root(input.Kind, input.Value, Assumed: input.Assumed))))
            .First(roots => Computation.Of(_definition, roots).Withheld is null);
    }

    [Benchmark(Description = "value")]
    public Computation Value() => Computation.Of(_definition, _roots);
}
