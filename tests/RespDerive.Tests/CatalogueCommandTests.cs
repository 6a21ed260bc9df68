using System.Text.Json.Nodes;
using RespDerive.Commands;
using RespDerive.Physiology;

namespace RespDerive.Tests;

public sealed class CatalogueCommandTests
{
    public static TheoryData<string> Keys => [.. Catalogue.Shipped.All.Select(definition => definition.Key)];

    [Fact]
    public async Task The_list_names_every_definition_under_its_purpose()
    {
        var (code, output, _) = await Cli.RunAsync("catalogue");
        Assert.Equal(Exit.Ok, code);
        Assert.All(Catalogue.Shipped.All, definition => Assert.Contains($"  {definition.Key} ", output, StringComparison.Ordinal));
        Assert.Matches(@"Oxygenation\n(  .*\n)*  pf-ratio +mm\[Hg\] +LOINC 50984-4 +needs PaO2, FiO2\n", output);
    }

    [Fact]
    public async Task The_list_marks_what_does_not_run_by_itself()
    {
        var (_, output, _) = await Cli.RunAsync("catalogue");
        foreach (var definition in Catalogue.Shipped.All)
        {
            var line = Assert.Single(output.Split('\n'), line => line.StartsWith($"  {definition.Key} ", StringComparison.Ordinal));
            Assert.Equal(definition.ByHandOnly, line.EndsWith(" (by hand only)", StringComparison.Ordinal));
            Assert.Equal(!definition.OnByDefault && !definition.ByHandOnly, line.EndsWith(" (off by default)", StringComparison.Ordinal));
        }
    }

    [Theory]
    [MemberData(nameof(Keys))]
    public async Task One_definition_is_shown_with_everything(string key)
    {
        var definition = Catalogue.Shipped.Find(key)!;
        var (code, output, _) = await Cli.RunAsync("catalogue", key);
        var flowing = string.Join(' ', output.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));
        Assert.Equal(Exit.Ok, code);
        Assert.All(
            [definition.Equation, definition.Assumptions, definition.Caution, .. definition.Citations.Select(citation => citation.Text), .. definition.Vectors.Select(vector => vector.Source), .. definition.Gates.Select(gate => gate.Code), .. definition.Codes.Select(code => code.Code)],
            part => Assert.Contains(part, flowing, StringComparison.Ordinal));
    }

    [Theory]
    [MemberData(nameof(Keys))]
    public async Task One_definition_in_json_carries_its_vectors_and_gates(string key)
    {
        var definition = Catalogue.Shipped.Find(key)!;
        var full = JsonNode.Parse((await Cli.RunAsync("catalogue", key, "--output", "json")).Output)!;
        Assert.Equal(key, (string)full["definition"]!);
        Assert.Equal(definition.Vectors.Count, full["vectors"]!.AsArray().Count);
        Assert.Equal(definition.Gates.Count, full["gates"]!.AsArray().Count);
    }

    [Fact]
    public async Task An_alias_finds_its_definition() =>
        Assert.StartsWith("elastance:", (await Cli.RunAsync("catalogue", "elastance-respiratory-system")).Output, StringComparison.Ordinal);

    [Fact]
    public async Task An_unknown_definition_is_a_usage_error() => Assert.Equal(Exit.Usage, (await Cli.RunAsync("catalogue", "pf")).Code);

    [Fact]
    public async Task The_list_in_json_has_one_object_each() =>
        Assert.Equal(Catalogue.Shipped.All.Count, JsonNode.Parse((await Cli.RunAsync("catalogue", "--output", "json")).Output)!.AsArray().Count);
}
