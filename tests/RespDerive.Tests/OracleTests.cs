using System.Globalization;
using System.Text.Json;
using System.Text.Json.Nodes;
using RespDerive.Commands;
using RespDerive.Physiology.Units;

namespace RespDerive.Tests;

/// <summary>Numeric and rule cases from outside this code, each with its source, by the way of <c>compute --lines</c>.</summary>
public sealed class OracleTests
{
    private static readonly JsonObject[] Cases =
        [.. Directory.GetFiles(AppContext.BaseDirectory, "oracle*.json").Order(StringComparer.Ordinal)
            .SelectMany(file => JsonNode.Parse(File.ReadAllText(file))!.AsArray()).Select(one => one!.AsObject())];

    public static TheoryData<string> Ids => [.. Cases.Select(one => (string)one["id"]!)];

    [Theory]
    [MemberData(nameof(Ids))]
    public async Task A_case_gives_its_number_or_its_reason(string id)
    {
        var oracle = Cases.Single(one => (string)one["id"]! == id);

        var answer = Assert.Single(await AnswersAsync([Request(oracle)]));

        Assert.Null(answer["error"]);
        Assert.Equal(id, (string)answer["id"]!);
        if ((string)oracle["kind"]! == "withhold")
        {
            Assert.Equal(((string)oracle["note"]!).Replace("withhold: ", "", StringComparison.Ordinal), (string)answer["withheld"]!["code"]!);
            Assert.Null(answer["value"]);
            Assert.Null(answer["published"]);
            Assert.Null(answer["uncertainty"]);
            return;
        }

        Assert.Null(answer["withheld"]);
        if ((string)oracle["kind"]! == "class")
        {
            Assert.Equal((string)oracle["expected"]!, (string)answer["value"]!["code"]!);
            Assert.Null(answer["published"]);
            Assert.Null(answer["unit"]);
            Assert.Null(answer["uncertainty"]);
            Assert.Equal(1, answer["bands"]!.AsArray().Sum(band => (double)band!["probability"]!), 1e-9);
            return;
        }

        Assert.True(Ucum.TryConvert((decimal)(double)answer["value"]!, (string)answer["unit"]!, (string)oracle["unit"]!, out var value));
        Assert.Equal((double)oracle["expected"]!, (double)value, (double)oracle["tolerance"]! + 1e-12);
        Assert.True(decimal.TryParse((string)answer["published"]!, NumberStyles.AllowDecimalPoint | NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out _));
        Assert.Equal(1, answer["inputs"]!.AsObject().Sum(input => (double)input.Value!["share"]!), 1e-9);
    }

    [Fact]
    public async Task All_cases_at_once_are_answered_in_order_around_a_bad_line()
    {
        var lines = Cases.Select(Request).ToList();
        lines.Insert(lines.Count / 2, "{\"id\":\"broken\",");

        var answers = await AnswersAsync(lines, Exit.Data);

        Assert.Equal(lines.Count, answers.Count);
        Assert.NotNull(answers[Cases.Length / 2]["error"]);
        Assert.Equal(Cases.Select(one => (string)one["id"]!), answers.Where(answer => answer["error"] is null).Select(answer => (string)answer["id"]!));
    }

    private static string Request(JsonObject oracle) =>
        new JsonObject { ["id"] = oracle["id"]!.DeepClone(), ["definition"] = oracle["definition"]!.DeepClone(), ["inputs"] = oracle["inputs"]!.DeepClone() }.ToJsonString();

    private static async Task<IReadOnlyList<JsonObject>> AnswersAsync(IEnumerable<string> lines, int code = Exit.Ok)
    {
        using var output = new StringWriter();
        Assert.Equal(code, await ComputeLines.RunAsync(new StringReader(string.Join('\n', lines)), output, CancellationToken.None));
        return [.. output.ToString().Split('\n', StringSplitOptions.RemoveEmptyEntries).Select(line => JsonSerializer.Deserialize<JsonObject>(line)!)];
    }
}
