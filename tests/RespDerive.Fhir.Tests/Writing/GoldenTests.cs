using System.Runtime.CompilerServices;
using System.Text;
using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Tests.Writing;

/// <summary>
/// What is written, for people to read in a review. After a wanted change: set RESPDERIVE_ACCEPT=1, run, read the difference.
/// </summary>
public sealed class GoldenTests
{
    [Fact]
    public void Pf_ratio() => Same("pf-ratio", Samples.Renderer().Observation(Samples.PfRatio, Samples.First));

    [Fact]
    public void Pf_ratio_provenance() => Same("pf-ratio.provenance", Samples.Renderer().Provenance(Samples.PfRatio, Samples.First, "Observation/9001"));

    [Fact]
    public void Driving_pressure_flagged() => Same("driving-pressure", Samples.Renderer().Observation(Samples.DrivingPressure, Samples.First));

    [Fact]
    public void Retraction() => Same("retraction", Samples.Renderer().Observation(Samples.PfRatio, Samples.Retraction));

    [Fact]
    public void Retraction_provenance() => Same("retraction.provenance", Samples.Renderer().Provenance(Samples.PfRatio, Samples.Retraction, "Observation/9001"));

    private static void Same(string name, Resource resource, [CallerFilePath] string here = "")
    {
        var file = Path.Combine(Path.GetDirectoryName(here)!, "Golden", name + ".json");
        var written = Encoding.UTF8.GetString(FhirJson.Readable(resource)) + "\n";
        if (Environment.GetEnvironmentVariable("RESPDERIVE_ACCEPT") == "1")
        {
            File.WriteAllText(file, written);
        }

        Assert.Equal(File.ReadAllText(file), written);
    }
}
