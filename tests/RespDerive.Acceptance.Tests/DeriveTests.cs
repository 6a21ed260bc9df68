using System.Globalization;
using System.Text.Json.Nodes;
using RespDerive.Sandbox;
using RespDerive.Sandbox.Patients;
using RespDerive.Service;
using RespDerive.Service.Tests;

namespace RespDerive.Acceptance.Tests;

public sealed class DeriveTests
{
    private static readonly DateTimeOffset Drawn = new(2026, 3, 2, 12, 0, 0, TimeSpan.Zero);

    [Fact]
    public async Task Files_and_service_give_the_same_results_under_the_same_identifiers()
    {
        using var folder = new Folder();
        await using var sandbox = await SandboxServer.StartAsync(new SandboxOptions(), TestContext.Current.CancellationToken);
        using var fhir = new FhirClient(sandbox.BaseUrl);
        var now = TimeProvider.System.GetUtcNow();
        foreach (var message in Scenario.Play(5, now.AddHours(-3), TimeSpan.FromHours(2.5)).Events)
        {
            await fhir.PutAsync(message.Json);
        }

        await File.WriteAllTextAsync(folder["policy.json"], """{"pressure":{"value":760,"unit":"mm[Hg]"}}""", TestContext.Current.CancellationToken);
        await using (var file = new StreamWriter(folder["ward.ndjson"]))
        {
            foreach (var type in IntakeOptions.DefaultCriteria)
            {
                foreach (var resource in await fhir.SearchAsync($"{type}_count=1000"))
                {
                    await file.WriteLineAsync(resource.ToJsonString());
                }
            }
        }

        var (code, output, error) = await Executable.RunAsync("derive", folder["ward.ndjson"], "--site", "north", "--source", "ehr", "--base", sandbox.BaseUrl, "--policy", folder["policy.json"]);
        Assert.True(code == 0, error);
        var derived = Told(output.Split('\n', StringSplitOptions.RemoveEmptyEntries).Select(line => JsonNode.Parse(line)!.AsObject()));
        Assert.True(derived.Length > 100, $"{derived.Length} results; {error}");

        await using var service = await Executable.ServeAsync($"http://127.0.0.1:{Ports.Free()}",
            ("Site", "north"), ("Store", folder["north.db"]), ("Source:Address", sandbox.BaseUrl), ("Policy", folder["policy.json"]),
            ("Intake:PollEvery", "00:00:01"), ("Delivery:On", "true"), ("Delivery:PublishHistory", "true"));
        await Until.Some(
            async () => Told(await fhir.SearchAsync("Observation?_count=1000")).SequenceEqual(derived) ? "" : null, "the same results from the service",
            async () => string.Join('\n', Told(await fhir.SearchAsync("Observation?_count=1000")).Except(derived).Concat(derived.Except(Told(await fhir.SearchAsync("Observation?_count=1000"))))));
    }

    [Fact]
    public async Task Line_that_cannot_be_read_is_named_and_the_rest_is_derived()
    {
        using var folder = new Folder();
        await File.WriteAllLinesAsync(folder["ward.ndjson"],
            [Line(Some.Patient("p")), "{\"resourceType\":\"Observation\",", Line(Some.FiO2("fio2", "p", 40, Drawn.AddHours(-1))), Line(Some.Gas("gas", "p", 80, Drawn))], TestContext.Current.CancellationToken);
        var (code, output, error) = await Executable.RunAsync("derive", folder["ward.ndjson"]);
        Assert.Equal(5, code);
        Assert.Contains(folder["ward.ndjson"] + ":2", error, StringComparison.Ordinal);
        Assert.Contains("\"value\":200", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task History_shows_every_edition_revisions_and_retractions_among_them()
    {
        using var folder = new Folder();
        await File.WriteAllLinesAsync(folder["ward.ndjson"],
        [
            Line(Some.Patient("p"), 1), Line(Some.FiO2("fio2", "p", 40, Drawn.AddHours(-1)), 1), Line(Some.Gas("gas", "p", 80, Drawn), 1),
            Line(Some.Gas("gas", "p", 100, Drawn, status: "corrected"), 2), Line(Some.Gas("gas", "p", 100, Drawn, status: "entered-in-error"), 3),
        ], TestContext.Current.CancellationToken);
        var (code, output, error) = await Executable.RunAsync("derive", folder["ward.ndjson"], "--history");
        Assert.True(code == 0, error);
        var resources = output.Split('\n', StringSplitOptions.RemoveEmptyEntries).Select(line => JsonNode.Parse(line)!.AsObject()).ToArray();
        var editions = resources.Where(one => one.ResultId() is not null).ToArray();
        Assert.Equal(["final 200", "corrected 250", "entered-in-error "], editions.Select(one => string.Create(CultureInfo.InvariantCulture, $"{one.Status()} {one.Value()}")));
        Assert.Single(editions.Select(one => one.ResultId()).Distinct());
        Assert.Equal(["CREATE", "UPDATE", "NULLIFY"], resources.Where(one => (string?)one["resourceType"] == "Provenance").Select(one => one.Activity()));
    }

    private static string Line(JsonObject resource, int version = 1)
    {
        resource["meta"] = new JsonObject { ["versionId"] = version.ToString(CultureInfo.InvariantCulture), ["lastUpdated"] = Some.Time(Drawn.AddMinutes(10 * version)) };
        return resource.ToJsonString();
    }

    /// <summary>Identifier, definition and value of every current result.</summary>
    private static string[] Told(IEnumerable<JsonObject> resources) =>
    [
        .. resources.Where(one => one.ResultId() is not null && one.Status() != "entered-in-error")
            .Select(one => string.Create(CultureInfo.InvariantCulture, $"{one.ResultId()} {one["code"]!["text"]} {one.Value()} {one["valueCodeableConcept"]?["text"]}")).Order(StringComparer.Ordinal),
    ];
}
