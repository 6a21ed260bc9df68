using BenchmarkDotNet.Attributes;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks.Stages;

/// <summary>Observation and Provenance of one result as the bytes of its transaction.</summary>
public class Render
{
    private static readonly ResultRenderer Renderer = new(Catalogue.Shipped, new RenderOptions { Site = "ward-alder", SoftwareVersion = "0", DeviceId = "1" });
    private static readonly Edition First = new() { Status = EditionStatus.Final, Recorded = Ward.Start };
    private readonly Outcome _outcome = Day.Made.Before.All.Where(outcome => outcome is { Definition: "pf-ratio", Withheld: null }).OrderBy(outcome => outcome.At).Last();

    [Benchmark(Description = "transaction of one result")]
    public byte[] Transaction() => FhirJson.Bytes(Renderer.Transaction(_outcome, First));
}
