using BenchmarkDotNet.Attributes;
using RespDerive.Fhir;

namespace RespDerive.Benchmarks.Stages;

/// <summary>Bytes of an Observation to readings.</summary>
public class Read
{
    private const int Count = 500;
    private readonly Message[] _messages = [.. Day.Made.Messages.Where(message => message.Type == "Observation").TakeLast(Count)];

    [Benchmark(Description = "Observation", OperationsPerInvoke = Count)]
    public int Observations()
    {
        var readings = 0;
        foreach (var message in _messages)
        {
            var facts = FactReader.Read(message.Body, Ward.Source, Ward.Base, null, message.Filed).Facts!;
            readings += Ward.Site.Rules.Read(facts, Day.Made.Set).Readings.Count;
        }

        return readings;
    }
}
