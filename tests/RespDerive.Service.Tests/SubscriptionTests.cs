using System.Text.Json.Nodes;
using RespDerive.Service.Intake;

namespace RespDerive.Service.Tests;

/// <summary>One Subscription per criterion, whatever the server makes of it.</summary>
public sealed class SubscriptionTests
{
    [Fact]
    public async Task Subscription_whose_criteria_the_server_rewrites_is_not_made_again()
    {
        using var server = new OddServer();
        JsonObject? held = null;
        var (created, updated, read, answering) = (0, 0, 0, 200);
        server.On("POST", "/fhir/Subscription", request =>
        {
            Interlocked.Increment(ref created);
            return OddServer.Json(201, Hold(request.Body!, "active"));
        });
        server.On("PUT", "/fhir/Subscription/one", request =>
        {
            Interlocked.Increment(ref updated);
            return OddServer.Json(200, Hold(request.Body!, "active"));
        });
        server.On("GET", "/fhir/Subscription", _ => OddServer.Json(200, OddServer.Page(Volatile.Read(ref held) is { } one ? [one] : [])));
        server.On("GET", "/fhir/Subscription/one", _ =>
        {
            Interlocked.Increment(ref read);
            return Volatile.Read(ref answering) == 200 ? OddServer.Json(200, Volatile.Read(ref held)!) : OddServer.Text(Volatile.Read(ref answering), "");
        });
        await using var alone = await Alone.StartAsync(server, ("Intake:Subscribe", "true"));
        await Until.True(() => alone.Get<SubscriptionKeeper>().Kept, "the subscription");
        await RoundAsync();
        await RoundAsync();
        await alone.StopServiceAsync();
        await alone.StartServiceAsync();
        await RoundAsync();
        Assert.Equal(1, created);

        // Turned off, it is asked for again under its id; a server in trouble says nothing about it.
        Hold(held!.ToJsonString(), "off");
        await RoundAsync();
        await Until.True(() => Volatile.Read(ref updated) == 1, "asked for again");
        Volatile.Write(ref answering, 500);
        await RoundAsync();
        Assert.Equal(1, created);

        // Gone, it is made anew; in the place of a second one the same list is looked at.
        Volatile.Write(ref held, null);
        Volatile.Write(ref answering, 404);
        await RoundAsync();
        await Until.True(() => Volatile.Read(ref created) == 2, "made anew");

        async Task RoundAsync()
        {
            var before = Volatile.Read(ref read);
            alone.Get<SubscriptionKeeper>().Hurry();
            await Until.True(() => Volatile.Read(ref read) > before, "another round");
        }

        JsonObject Hold(string body, string status)
        {
            var subscription = JsonNode.Parse(body)!.AsObject();
            subscription["id"] = "one";
            subscription["status"] = status;
            subscription["criteria"] = "Observation?_source=rewritten";
            Volatile.Write(ref held, subscription);
            return subscription;
        }
    }

    [Fact]
    public async Task Procedures_come_in_by_default()
    {
        await using var bench = await Bench.StartAsync();
        await bench.Fhir.PutAsync(new JsonObject
        {
            ["resourceType"] = "Procedure",
            ["id"] = "ventilation",
            ["status"] = "completed",
            ["code"] = new JsonObject { ["coding"] = new JsonArray(new JsonObject { ["system"] = "http://snomed.info/sct", ["code"] = "40617009" }) },
            ["subject"] = new JsonObject { ["reference"] = "Patient/p" },
            ["performedPeriod"] = new JsonObject { ["end"] = "2026-03-01T10:00:00Z" },
        });
        await Until.True(() => bench.Store.Counts().Readings == 1, "the end of the support", bench.Thoughts);
    }
}
