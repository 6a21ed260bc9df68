using System.Text;
using System.Text.Json.Nodes;
using RespDerive.Commands;
using RespDerive.Docs;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;

namespace RespDerive.Tests;

/// <summary>A derived value is added in one file: everything else follows from it.</summary>
public sealed class ExtraDefinitionTests
{
    private static readonly Catalogue Catalogue = new(typeof(Catalogue).Assembly, typeof(ExtraDefinition).Assembly);

    [Fact]
    public async Task The_catalogue_lists_and_shows_it()
    {
        Assert.Matches(@"Invented\n  plateau-rate-product +cm\[H2O\] +needs Pplat, RR\n", (await Cli.RunAsync(Catalogue, "catalogue")).Output);
        Assert.Contains("PRP = Pplat·RR", (await Cli.RunAsync(Catalogue, "catalogue", "plateau-rate-product")).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task It_is_computed_by_hand()
    {
        var (code, output, _) = await Cli.RunAsync(Catalogue, "compute", "plateau-rate-product", "Pplat=24", "RR=20");
        Assert.Equal(Exit.Ok, code);
        Assert.Contains("PRP = 480 cm[H2O]", output, StringComparison.Ordinal);

        using var answers = new StringWriter();
        await ComputeLines.RunAsync(Catalogue, new StringReader("""{"definition":"plateau-rate-product","inputs":{"Pplat":24,"RR":20}}"""), answers, CancellationToken.None);
        Assert.Equal(480, (double)JsonNode.Parse(answers.ToString())!["value"]!);
    }

    [Fact]
    public async Task It_is_derived_from_the_record_and_posted_under_its_own_code()
    {
        var (code, output, error) = await DeriveAsync(Catalogue);
        Assert.True(code == Exit.Ok, error);
        var observation = Assert.Single(output, one => (string)one["resourceType"]! == "Observation" && one["code"]!.ToJsonString().Contains("plateau-rate-product", StringComparison.Ordinal));

        Assert.Equal("final", (string)observation["status"]!);
        Assert.Equal("cm[H2O]", (string)observation["valueQuantity"]!["code"]!);
        Assert.Equal(Expected(), (double)observation["valueQuantity"]!["value"]!);
        Assert.DoesNotContain((await DeriveAsync(Catalogue.Shipped)).Output, one => one.ToJsonString().Contains("plateau-rate-product", StringComparison.Ordinal));
    }

    [Fact]
    public void It_has_a_Library_with_its_document()
    {
        var library = new ResultRenderer(Catalogue, new RenderOptions { Site = "test", SoftwareVersion = "0" }).Definition(Catalogue.Find("plateau-rate-product")!);
        Assert.EndsWith("plateau-rate-product", library.Url, StringComparison.Ordinal);
        Assert.Equal("1", library.Version);
        Assert.Contains("PRP = Pplat·RR", Encoding.UTF8.GetString(library.Content[0].Data!), StringComparison.Ordinal);
    }

    [Fact]
    public async Task It_has_a_page_and_a_row_in_every_table()
    {
        var folder = Directory.CreateTempSubdirectory("respderive-docs").FullName;
        try
        {
            Assert.Equal(Exit.Ok, (await Cli.RunAsync(Catalogue, "docs", "--out", folder)).Code);
            var page = await File.ReadAllTextAsync(Path.Combine(folder, "derived", "plateau-rate-product.md"), TestContext.Current.CancellationToken);
            Assert.Contains(@"\mathrm{PRP} = \mathrm{Pplat}\cdot \mathrm{RR}", page, StringComparison.Ordinal);
            Assert.Contains("PRP = 480 cm[H2O]", page, StringComparison.Ordinal);
            Assert.All(["derived/index.md", "anchors.md"], name => Assert.Contains("plateau-rate-product", File.ReadAllText(Path.Combine(folder, name)), StringComparison.Ordinal));
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    [Fact]
    public void The_shipped_catalogue_knows_nothing_of_it() => Assert.False(Reference.Of(Catalogue.Shipped).ContainsKey("derived/plateau-rate-product.md"));

    private static double Expected()
    {
        var readings = File.ReadLines(Repository.PathOf("docs", "examples", "ward.ndjson")).Select(line => JsonNode.Parse(line)!).ToArray();
        double Of(string display) => (double)readings.Single(one => one["code"]?["coding"]?[0]?["display"]?.ToString() == display)["valueQuantity"]!["value"]!;
        return Of("Pressure.plateau Respiratory system airway --on ventilator") * Of("Breath rate spontaneous and mechanical --on ventilator");
    }

    private static async Task<(int Code, JsonNode[] Output, string Error)> DeriveAsync(Catalogue catalogue)
    {
        var results = Path.GetTempFileName();
        try
        {
            var (code, _, error) = await Cli.RunAsync(catalogue, "derive", Repository.PathOf("docs", "examples", "ward.ndjson"), "--pressure", "760", "--out", results);
            return (code, [.. File.ReadLines(results).Select(line => JsonNode.Parse(line)!)], error);
        }
        finally
        {
            File.Delete(results);
        }
    }
}
