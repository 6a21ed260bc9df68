using System.Globalization;
using System.Text.Json.Nodes;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>Servers, and what stands before them, that answer otherwise than the standard says.</summary>
public sealed class OddServerTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Transaction_carried_out_by_half_gets_its_Provenance_afterwards()
    {
        using var server = new OddServer();
        server.Next(transaction => OddServer.Json(200, OddServer.Response(
            [server.Keep(transaction), OddServer.Failed("500 Internal Server Error"), .. transaction["entry"]!.AsArray().Skip(2).Select(_ => OddServer.Failed("500"))])));
        await using var bench = await WritingToAsync(server);
        await Until.True(() => bench.Store.Counts() is { Delivered: 1, Pending: 0 }, "delivery");
        var provenance = Assert.Single(server.Provenances);
        Assert.Equal("Observation/one", provenance["target"]![0]!["reference"]!.ToString());
        Assert.Equal("CREATE", provenance.Activity());
        Assert.Single(server.Transactions);
    }

    [Fact]
    public async Task Error_page_of_a_gateway_only_delays()
    {
        using var server = new OddServer();
        server.Next(_ => OddServer.Text(502, $"<html><body>Bad gateway for {Some.Mark}</body></html>"));
        server.Next(_ => OddServer.Text(200, "<html><body>Please log in</body></html>"));
        await using var bench = await WritingToAsync(server);
        await Until.True(() => bench.Store.Counts() is { Delivered: 1, Pending: 0 }, "delivery");
        Assert.Equal(200, server.Held!.Value());
        Assert.Empty(server.Provenances);
        Assert.Equal(3, server.Transactions.Count);
    }

    [Fact]
    public async Task Version_conflict_told_inside_a_success_is_seen()
    {
        using var server = new OddServer();
        await using var bench = await WritingToAsync(server);
        await Until.True(() => bench.Store.Counts() is { Delivered: 1, Pending: 0 }, "delivery");
        var held = server.Held!;
        server.Next(transaction =>
        {
            // Somebody was faster.
            held["note"] = new JsonArray(new JsonObject { ["text"] = "changed by hand" });
            server.Keep(new JsonObject { ["entry"] = new JsonArray(new JsonObject { ["resource"] = held.DeepClone() }) });
            return OddServer.Json(200, OddServer.Response([OddServer.Failed("412 Precondition Failed"), OddServer.Done("Provenance/stray", 1)]));
        });
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 100, Drawn, status: "corrected"));
        await Until.True(() => bench.Store.Counts().Refused == 1, "parked");
        Assert.Equal("foreign-edit", Assert.Single(bench.Store.ParkedDeliveries(10)).Parked);
        Assert.Equal(200, server.Held!.Value());
        Assert.Equal("W/\"1\"", server.Transactions[^1]["entry"]![0]!["request"]!["ifMatch"]!.ToString());
    }

    [Fact]
    public async Task Refusal_for_good_is_parked_without_what_the_server_quotes()
    {
        using var server = new OddServer();
        server.Next(_ => OddServer.Json(422, new JsonObject
        {
            ["resourceType"] = "OperationOutcome",
            ["issue"] = new JsonArray(new JsonObject
            {
                ["severity"] = "error",
                ["code"] = "business-rule",
                ["diagnostics"] = $"{Some.Mark}, born 1971-02-03, has no encounter",
                ["expression"] = new JsonArray("Observation.encounter"),
            }),
        }));
        await using var bench = await WritingToAsync(server);
        await Until.True(() => bench.Store.Counts() is { Refused: 1, Pending: 0 }, "parked");
        var parked = Assert.Single(bench.Store.ParkedDeliveries(10));
        Assert.Equal("business-rule", parked.Parked);
        Assert.Contains("Observation.encounter", parked.ParkedText, StringComparison.Ordinal);
        Assert.DoesNotContain(Some.Mark, parked.ParkedText, StringComparison.Ordinal);
        Assert.DoesNotContain("1971", parked.ParkedText, StringComparison.Ordinal);

        Assert.True(await bench.Store.ResendAsync(parked.Identity));
        await Until.True(() => bench.Store.Counts() is { Delivered: 1, Refused: 0 }, "delivery after a resend");
    }

    [Fact]
    public async Task Pages_without_a_next_link_are_read_on_from_where_they_end()
    {
        using var server = new OddServer();
        var now = TimeProvider.System.GetUtcNow();
        var all = Enumerable.Range(0, 12).Select(i => With(Some.Gas($"gas{i}", "p", 60 + i, Drawn.AddMinutes(i)), now.AddSeconds(i - 20))).Append(With(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)), now.AddSeconds(-1))).ToArray();
        // It answers with the oldest four since the time asked for, and never says that there are more.
        server.On("GET", "/fhir/Observation", request => OddServer.Json(200, OddServer.Page(
            all.Where(one => Time(one) >= DateTimeOffset.Parse(request.GetParameter("_lastUpdated")![0][2..], CultureInfo.InvariantCulture)).OrderBy(Time).Take(4))));
        await using var bench = await ReadingAsync(server);
        await Until.True(() => bench.Store.Counts().Received == 13, "everything read");
    }

    [Fact]
    public async Task Search_that_breaks_off_is_done_again_when_the_server_does_not_sort()
    {
        using var server = new OddServer();
        var now = TimeProvider.System.GetUtcNow();
        var (newest, oldest) = (With(Some.Gas("gas", "p", 80, Drawn), now.AddSeconds(-5)), With(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)), now.AddHours(-1)));
        var broken = 3;
        server.On("GET", "/fhir/Observation", request =>
        {
            var since = DateTimeOffset.Parse(request.GetParameter("_lastUpdated")![0][2..], CultureInfo.InvariantCulture);
            var page = OddServer.Page(Time(newest) >= since ? [newest] : []);
            page["link"] = new JsonArray(new JsonObject { ["relation"] = "self", ["url"] = "Observation?_count=200" });
            if (Time(oldest) >= since)
            {
                page["link"]!.AsArray().Add(new JsonObject { ["relation"] = "next", ["url"] = $"{server.BaseUrl}/more" });
            }

            return OddServer.Json(200, page);
        });
        server.On("GET", "/fhir/more", _ => broken-- > 0 ? OddServer.Text(500, "broken") : OddServer.Json(200, OddServer.Page([oldest])));
        await using var bench = await ReadingAsync(server);
        await Until.True(() => bench.Store.Counts().Results == 1, "the result of both pages");
    }

    private static Task<Bench> ReadingAsync(OddServer server) =>
        Bench.StartAsync([.. Bench.Polling, ("Source:Address", server.BaseUrl), ("Intake:Criteria:0", "Observation?"), ("Intake:PageSize", "4"), ("Delivery:On", "false")]);

    private static JsonObject With(JsonObject resource, DateTimeOffset updated)
    {
        resource["meta"] = new JsonObject { ["versionId"] = "1", ["lastUpdated"] = Some.Time(updated) };
        return resource;
    }

    private static DateTimeOffset Time(JsonObject resource) => DateTimeOffset.Parse(resource["meta"]!["lastUpdated"]!.ToString(), CultureInfo.InvariantCulture);

    /// <summary>Reads the sandbox, writes to the odd server.</summary>
    private static async Task<Bench> WritingToAsync(OddServer server)
    {
        var bench = await Bench.StartAsync(("Delivery:Address", server.BaseUrl));
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
        return bench;
    }
}
