using System.Text.Json.Nodes;

namespace RespDerive.Tests;

public sealed class DeriveCommandTests
{
    [Fact]
    public async Task Observation_that_names_no_patient_is_counted_as_not_read()
    {
        var folder = Directory.CreateTempSubdirectory("respderive-derive-");
        try
        {
            var (file, results) = (Path.Combine(folder.FullName, "in.ndjson"), Path.Combine(folder.FullName, "out.ndjson"));
            await File.WriteAllLinesAsync(file, [Gas("one", """ "subject":{"reference":"Patient/p"}, """), Gas("two", ""), Gas("three", """ "subject":{"reference":"Device/d"}, """)], TestContext.Current.CancellationToken);
            var (code, output, error) = await Cli.RunAsync("derive", file, "--out", results, "--output", "json");
            Assert.True(code == 0, error);
            var summary = JsonNode.Parse(output)!;
            Assert.Equal((1, 1, 2), ((int)summary["resources"]!, (int)summary["readings"]!, (int)summary["notRead"]!));
        }
        finally
        {
            folder.Delete(recursive: true);
        }
    }

    private static string Gas(string id, string subject) =>
        $$$"""{"resourceType":"Observation","id":"{{{id}}}","status":"final",{{{subject}}}"code":{"coding":[{"system":"http://loinc.org","code":"2703-7"}]},"effectiveDateTime":"2026-03-01T08:00:00Z","valueQuantity":{"value":80,"system":"http://unitsofmeasure.org","code":"mm[Hg]"}}""";
}
