using System.Text.Json.Nodes;
using RespDerive.Commands;

namespace RespDerive.Tests;

public sealed class ComputeCommandTests
{
    [Fact]
    public async Task A_value_is_printed_with_its_unit_and_each_input_in_words()
    {
        var (code, output, error) = await Cli.RunAsync("compute", "pf-ratio", "pao2=90 mm[Hg]", "fio2=0.40");
        Assert.Equal(Exit.Ok, code);
        Assert.Empty(error);
        Assert.Contains("PF = 225 mm[Hg]", output, StringComparison.Ordinal);
        Assert.Matches(@"arterial oxygen partial pressure \(PaO2\)\s+90 mm\[Hg\]\s+57 % of the variance", output);
        Assert.Matches(@"inspired oxygen fraction \(FiO2\)\s+0\.4\s+43 % of the variance", output);
        Assert.Contains("Not a diagnosis", output, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("fio2=40%")]
    [InlineData("fio2=40 %")]
    [InlineData("fio2=4e-1")]
    [InlineData("FiO2=+.4")]
    public async Task A_unit_may_follow_with_or_without_a_space(string fio2) =>
        Assert.Contains("PF = 225 mm[Hg]", (await Cli.RunAsync("compute", "pf-ratio", "PaO2=90", fio2)).Output, StringComparison.Ordinal);

    [Fact]
    public async Task The_json_answer_has_exactly_the_agreed_members()
    {
        var (code, output, _) = await Cli.RunAsync("compute", "aa-gradient", "PaO2=10 kPa", "FiO2=0.21", "PB=760", "PaCO2=40", "SpO2=95", "--output", "json");
        var answer = JsonNode.Parse(output)!.AsObject();
        Assert.Equal(Exit.Ok, code);
        Assert.Equal(["id", "definition", "revision", "value", "published", "unit", "uncertainty", "inputs", "unused", "flags", "withheld"], answer.Select(member => member.Key));
        Assert.Equal("27", (string)answer["published"]!);
        Assert.Equal("mm[Hg]", (string)answer["unit"]!);
        Assert.Equal("[\"SpO2\"]", answer["unused"]!.ToJsonString());
        var inputs = answer["inputs"]!.AsObject();
        Assert.Equal(["barometric-pressure", "fio2", "paco2", "pao2", "respiratory-quotient", "water-vapour-pressure"], inputs.Select(input => input.Key).Order(StringComparer.Ordinal));
        Assert.All(inputs, input => Assert.Equal(["value", "unit", "given", "assumed", "share"], input.Value!.AsObject().Select(member => member.Key)));
        Assert.Equal("10 kPa", (string)inputs["pao2"]!["given"]!);
        Assert.Equal(75.0064, (double)inputs["pao2"]!["value"]!, 1e-3);
        Assert.True((bool)inputs["respiratory-quotient"]!["assumed"]!);
        Assert.Null(inputs["respiratory-quotient"]!["given"]);
        Assert.Equal(1, inputs.Sum(input => (double)input.Value!["share"]!), 1e-9);
    }

    [Fact]
    public async Task A_withheld_value_is_a_finding_with_its_code_and_what_is_missing()
    {
        var (code, output, _) = await Cli.RunAsync("compute", "pf-ratio", "pao2=90");
        Assert.Equal(Exit.Findings, code);
        Assert.Contains("input-missing", output, StringComparison.Ordinal);
        Assert.Contains("inspired oxygen fraction", output, StringComparison.Ordinal);

        var answer = JsonNode.Parse((await Cli.RunAsync("compute", "pf-ratio", "pao2=90", "-o", "json")).Output)!;
        Assert.Equal("input-missing", (string)answer["withheld"]!["code"]!);
        Assert.Null(answer["value"]);
        Assert.Null(answer["published"]);
        Assert.Null(answer["uncertainty"]);
    }

    [Fact]
    public async Task Without_inputs_it_says_what_is_needed()
    {
        var (code, output, _) = await Cli.RunAsync("compute", "elastance");
        Assert.Equal(Exit.Findings, code);
        Assert.Matches(@"Cstat +static compliance .* given, or computed\n", output);
        Assert.Matches(@"Pplat +plateau pressure +plateau-pressure +3 to 100 cm\[H2O\]", output);
        Assert.Contains("respderive compute elastance \"Cstat=40 mL/cm[H2O]\"", output, StringComparison.Ordinal);
        Assert.Equal("input-missing", (string)JsonNode.Parse((await Cli.RunAsync("compute", "pf-ratio", "-o", "json")).Output)!["withheld"]!["code"]!);
    }

    [Theory]
    [InlineData("PAO2, PaO2, pao2", "compute", "pf-ratio", "Pa02=90", "fio2=0.4")]
    [InlineData("pf-ratio", "compute", "pf-ration", "pao2=90")]
    [InlineData("kPa", "compute", "pf-ratio", "pao2=90 mmHg", "fio2=0.4")]
    [InlineData("name=value", "compute", "pf-ratio", "90")]
    [InlineData("not a number", "compute", "pf-ratio", "pao2=high", "fio2=0.4")]
    [InlineData("too many digits", "compute", "pf-ratio", "pao2=1e99", "fio2=0.4")]
    [InlineData("--lines", "compute")]
    [InlineData("--lines", "compute", "pf-ratio", "--lines")]
    [InlineData("bogus", "bogus")]
    [InlineData("xml", "compute", "pf-ratio", "pao2=90", "--output", "xml")]
    public async Task A_wrong_request_is_a_usage_error_that_says_what_to_do(string said, params string[] args)
    {
        var (code, output, error) = await Cli.RunAsync(args);
        Assert.Equal(Exit.Usage, code);
        Assert.Empty(output);
        Assert.Contains(said, error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_wrong_request_in_json_is_answered_in_json()
    {
        var (code, output, _) = await Cli.RunAsync("compute", "pf-ratio", "Pa02=90", "--output", "json");
        Assert.Equal(Exit.Usage, code);
        Assert.Contains("PaO2", (string)JsonNode.Parse(output)!["error"]!, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("""{"id":7,"definition":"pf-ratio","inputs":{"PaO2":{"value":"90"},"FiO2":0.4}}""", "not a number")]
    [InlineData("""{"id":7,"definition":"pf-ratio","inputs":{"PaO2":{"value":90,"units":"kPa"},"FiO2":0.4}}""", "units")]
    [InlineData("""{"id":7,"definition":"pf-ratio","inputs":{"PaO2":90,"PaO2":91,"FiO2":0.4}}""", "twice")]
    [InlineData("""{"id":7,"definition":"pf-ratio","inputs":{"PaO2":[90],"FiO2":0.4}}""", "neither")]
    [InlineData("""{"id":7,"definition":"pf-ratio","inputs":{"PaO2":1e400,"FiO2":0.4}}""", "neither")]
    [InlineData("""{"id":7,"definition":"pf-ratio"}""", "inputs")]
    [InlineData("""{"id":7,"inputs":{}}""", "definition")]
    public async Task A_line_that_cannot_be_used_is_answered_under_its_own_id(string line, string said)
    {
        using var output = new StringWriter();
        Assert.Equal(Exit.Data, await ComputeLines.RunAsync(new StringReader(line), output, CancellationToken.None));
        var answer = JsonNode.Parse(output.ToString())!;
        Assert.Equal(7, (int)answer["id"]!);
        Assert.Contains(said, (string)answer["error"]!, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("null")]
    [InlineData("\"missing\"")]
    [InlineData("{\"value\":null}")]
    public async Task Null_and_missing_are_absent_inputs(string fio2)
    {
        using var output = new StringWriter();
        var line = """{"definition":"pf-ratio","inputs":{"PaO2":90,"FiO2":X}}""".Replace("X", fio2, StringComparison.Ordinal);
        Assert.Equal(Exit.Ok, await ComputeLines.RunAsync(new StringReader(line), output, CancellationToken.None));
        Assert.Equal("input-missing", (string)JsonNode.Parse(output.ToString())!["withheld"]!["code"]!);
    }

    [Fact]
    public async Task A_shared_transducer_offset_is_an_input_of_its_own()
    {
        using var output = new StringWriter();
        const string Line = """{"definition":"driving-pressure","inputs":{"Pplat":{"value":25,"transducer":"a"},"PEEPset":{"value":5,"transducer":"a"},"PEEPi":{"value":5,"transducer":"a"}}}""";
        await ComputeLines.RunAsync(new StringReader(Line), output, CancellationToken.None);
        var inputs = JsonNode.Parse(output.ToString())!["inputs"]!.AsObject();
        Assert.True((double)inputs["zero-offset:a"]!["share"]! > 0.5);
        Assert.Equal(1, inputs.Sum(input => (double)input.Value!["share"]!), 1e-9);
    }

    [Fact]
    public async Task A_coded_result_has_a_code_with_its_text_and_the_probability_of_each_band()
    {
        var (code, output, _) = await Cli.RunAsync("compute", "ards-oxygenation-band", "PF=205", "PEEP=8", "PB=760", "-o", "json");
        var answer = JsonNode.Parse(output)!.AsObject();
        Assert.Equal(Exit.Ok, code);
        Assert.Equal("mild", (string)answer["value"]!["code"]!);
        Assert.Equal("Oxygenation criterion: mild band", (string)answer["value"]!["text"]!);
        Assert.All(["published", "unit", "uncertainty", "withheld"], member => Assert.Null(answer[member]));
        Assert.Equal(["severe", "moderate", "mild", "none"], answer["bands"]!.AsArray().Select(band => (string)band!["code"]!));

        var text = (await Cli.RunAsync("compute", "ards-oxygenation-band", "PF=205", "PEEP=8", "PB=760")).Output;
        Assert.Contains("by berlin-2012 from PF = 205 mm[Hg] ± 14 mm[Hg]", text, StringComparison.Ordinal);
        Assert.Contains("probability: moderate 38 %, mild 62 %", text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_withheld_band_has_no_bands()
    {
        var answer = JsonNode.Parse((await Cli.RunAsync("compute", "ards-oxygenation-band", "PF=205", "PEEP=3", "-o", "json")).Output)!.AsObject();
        Assert.Equal("peep-below-minimum", (string)answer["withheld"]!["code"]!);
        Assert.Null(answer["value"]);
        Assert.False(answer.ContainsKey("bands"));
    }

    [Fact]
    public async Task Help_shows_examples()
    {
        Assert.Contains("compute pf-ratio \"pao2=90 mm[Hg]\" fio2=0.40", (await Cli.RunAsync("compute", "--help")).Output, StringComparison.Ordinal);
        Assert.Contains("Examples:", (await Cli.RunAsync("--help")).Output, StringComparison.Ordinal);
    }
}
