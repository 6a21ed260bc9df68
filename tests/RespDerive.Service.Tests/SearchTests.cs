using System.Globalization;
using System.Text.Json.Nodes;
using WireMock;

namespace RespDerive.Service.Tests;

/// <summary>Searches on servers that refuse some, date changes in the future, or end a search after one page.</summary>
public sealed class SearchTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);
    private static readonly (string, string?) Often = ("Intake:PollEvery", "00:00:00.2");

    [Fact]
    public async Task Refused_criterion_does_not_keep_the_others_waiting()
    {
        using var server = new OddServer();
        var (refused, read) = (0, 0);
        server.On("GET", "/fhir/DeviceMetric", _ =>
        {
            Interlocked.Increment(ref refused);
            return OddServer.Json(400, new JsonObject
            {
                ["resourceType"] = "OperationOutcome",
                ["issue"] = new JsonArray(new JsonObject { ["severity"] = "error", ["code"] = "not-supported", ["diagnostics"] = Some.Mark }),
            });
        });
        server.On("GET", "/fhir/Observation", _ =>
        {
            Interlocked.Increment(ref read);
            return OddServer.Json(200, OddServer.Page([Changed(Some.Gas("gas", "p", 80, Drawn), Drawn)]));
        });
        await using var alone = await Alone.StartAsync(server, Often, ("Intake:Criteria:0", "DeviceMetric?"), ("Intake:Criteria:1", "Observation?"));
        await Until.True(() => alone.Store.Counts().Readings == 1 && Volatile.Read(ref read) >= 10, "the other criterion");
        Assert.InRange(Volatile.Read(ref refused), 1, Volatile.Read(ref read) - 1);
        Assert.False((bool)JsonNode.Parse(await alone.ReadyAsync())!["read"]!);
        Assert.Contains("Poller failed to read {Type}", CapturedLogs.Text, StringComparison.Ordinal);
        Assert.Contains("\"Type\":\"DeviceMetric\",\"Answer\":\"not-supported\",\"Text\":\"HTTP 400", CapturedLogs.Text, StringComparison.Ordinal);
        Assert.DoesNotContain(Some.Mark, CapturedLogs.Text, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Change_dated_in_the_future_hides_nothing()
    {
        using var server = new OddServer();
        var held = new List<JsonObject> { Changed(Some.Gas("ahead", "p", 70, Drawn), TimeProvider.System.GetUtcNow().AddYears(20)) };
        server.On("GET", "/fhir/Observation", request => Answer(request, held));
        await using var alone = await Alone.StartAsync(server, Often);
        await Until.True(() => alone.Store.Counts().Readings == 1 && alone.Store.Cursor("search:Observation?") is not null, "the one ahead");
        lock (held)
        {
            held.Add(Changed(Some.Gas("gas", "p", 80, Drawn), TimeProvider.System.GetUtcNow()));
        }

        await Until.True(() => alone.Store.Counts().Readings == 2, "the one of now");
    }

    [Fact]
    public async Task Full_page_of_one_instant_is_read_with_a_larger_one()
    {
        using var server = new OddServer();
        using var counted = new Counted("respderive.intake.pages_of_one_instant");
        var imported = TimeProvider.System.GetUtcNow().AddMinutes(-5);
        List<JsonObject> held = [.. Enumerable.Range(0, 11).Select(i => Changed(Some.Gas($"gas{i}", "p", 60 + i, Drawn), imported)), Changed(Some.Gas("after", "p", 90, Drawn), imported.AddMinutes(4))];
        server.On("GET", "/fhir/Observation", request => Answer(request, held));
        await using var alone = await Alone.StartAsync(server, ("Intake:PageSize", "4"));
        await Until.True(() => alone.Store.Counts().Readings == held.Count, "everything");
        Assert.True(counted.Sum > 0);
    }

    /// <summary>The oldest since the time asked for, as many as asked for, never with a word of more.</summary>
    private static ResponseMessage Answer(IRequestMessage request, List<JsonObject> held)
    {
        var since = DateTimeOffset.Parse(request.GetParameter("_lastUpdated")![0][2..], CultureInfo.InvariantCulture);
        var count = int.Parse(request.GetParameter("_count")![0], CultureInfo.InvariantCulture);
        lock (held)
        {
            return OddServer.Json(200, OddServer.Page([.. held.Where(one => Time(one) >= since).OrderBy(Time).Take(count)]));
        }
    }

    private static DateTimeOffset Time(JsonObject resource) => DateTimeOffset.Parse(resource["meta"]!["lastUpdated"]!.ToString(), CultureInfo.InvariantCulture);

    private static JsonObject Changed(JsonObject resource, DateTimeOffset at)
    {
        resource["meta"] = new JsonObject { ["versionId"] = "1", ["lastUpdated"] = Some.Time(at) };
        return resource;
    }
}
