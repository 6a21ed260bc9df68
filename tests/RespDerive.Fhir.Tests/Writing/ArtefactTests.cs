using System.Security.Cryptography;
using System.Text;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class ArtefactTests
{
    [Fact]
    public void The_id_of_a_document_is_the_hash_of_its_content()
    {
        var library = Samples.Renderer().Policy(Samples.Policy);
        Assert.Equal(Convert.ToHexStringLower(SHA256.HashData(library.Content[0].Data!)), library.Id);
        Assert.Equal(Samples.Policy.Hash, library.Id);
        Assert.Equal(library.Id, library.Version);
        Assert.True(library.Id.Length <= 64, "FHIR ids have at most 64 characters");
    }

    [Fact]
    public void Provenance_names_the_libraries_by_url_and_version()
    {
        var renderer = Samples.Renderer();
        var definition = renderer.Definition(Catalogue.Shipped.Find("pf-ratio")!);
        var policy = renderer.Policy(Samples.Policy);
        Assert.Equal([$"{definition.Url}|{definition.Version}", $"{policy.Url}|{policy.Version}"], renderer.Provenance(Samples.PfRatio, Samples.First, "Observation/1").Policy);
    }

    [Fact]
    public void The_document_of_a_definition_lets_a_reader_check_the_number()
    {
        var text = Encoding.UTF8.GetString(DefinitionDocument.Of(Catalogue.Shipped.Find("pf-ratio")!));
        Assert.Contains("\"equation\":\"PF = PaO2 / FiO2\"", text, StringComparison.Ordinal);
        Assert.Contains("\"unit\":\"mm[Hg]\"", text, StringComparison.Ordinal);
        Assert.Contains("fio2-set", text, StringComparison.Ordinal);
    }

    [Fact]
    public void The_document_of_a_band_lists_its_criteria_with_their_cut_points()
    {
        var text = Encoding.UTF8.GetString(DefinitionDocument.Of(Catalogue.Shipped.Find("ards-oxygenation-band")!));
        Assert.Contains("\"cuts\":[100,200,300]", text, StringComparison.Ordinal);
        Assert.Contains("\"name\":\"berlin-2012\"", text, StringComparison.Ordinal);
        Assert.Contains("\"code\":\"moderate\"", text, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_definition_has_a_document_of_its_own() =>
        Assert.Equal(Catalogue.Shipped.All.Count, Catalogue.Shipped.All.Select(DefinitionDocument.Hash).Distinct().Count());

    [Fact]
    public void There_is_one_Device_for_each_software_version()
    {
        static string Id(string version) => Samples.Renderer(options => options with { SoftwareVersion = version }).Device().Identifier[0].Value!;
        Assert.Equal(Id("0.1.0"), Id("0.1.0"));
        Assert.NotEqual(Id("0.1.0"), Id("0.1.1"));
    }

    [Fact]
    public async Task Ndjson_is_one_resource_a_line()
    {
        using var output = new MemoryStream();
        await FhirJson.WriteLineAsync(output, Samples.Renderer().Observation(Samples.PfRatio, Samples.First), TestContext.Current.CancellationToken);
        await FhirJson.WriteLineAsync(output, Samples.Renderer().Device(), TestContext.Current.CancellationToken);
        var lines = Encoding.UTF8.GetString(output.ToArray()).Split('\n');
        Assert.Equal(["Observation", "Device"], lines[..^1].Select(line => R4Validation.Strict(Encoding.UTF8.GetBytes(line)).TypeName));
        Assert.Equal("", lines[^1]);
    }
}
