using static RespDerive.Sandbox.Tests.Endpoint.Client;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>Rules quoted from FHIR R4 Subscription (hl7.org/fhir/R4/subscription.html).</summary>
public sealed class SubscriptionTests
{
    // "REST Hook": with a payload type the endpoint is updated as a FHIR base, PUT {endpoint}/{Type}/{id}; headers are added.
    [Fact]
    public async Task With_payload_the_resource_is_put_to_the_endpoint()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        var subscription = await c.Created(Subscription("Observation?code=2703-7", hook.Url));
        Assert.Equal("active", (await c.Get($"Subscription/{subscription}")).Json["status"]!.GetValue<string>());
        await c.Created(Observation(code: "2019-8"));
        var id = await c.Created(Observation(value: "80.0"));
        var notice = await hook.Next();
        Assert.Equal(("PUT", $"/hook/Observation/{id}", "Bearer invented"), (notice.Method, notice.Path, notice.Authorization));
        Assert.Equal((await c.Get($"Observation/{id}")).Text, notice.Body);
        await c.Server.Notifications.QuietAsync(Cancel);
        Assert.Equal((1, 0, 0), (c.Server.Notifications.Delivered, c.Server.Notifications.Dropped, hook.Waiting));
    }

    // "REST Hook": without a payload type, a POST with no body.
    [Fact]
    public async Task Without_payload_the_notification_is_empty()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        await c.Created(Subscription("Observation?", hook.Url, payload: false));
        await c.Created(Observation());
        var notice = await hook.Next();
        Assert.Equal(("POST", "/hook", ""), (notice.Method, notice.Path, notice.Body));
    }

    [Fact]
    public async Task Updates_are_notified_in_order_and_deletes_are_not()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        await c.Created(Subscription("Observation", hook.Url));
        var id = await c.Created(Observation());
        for (var i = 1; i < 6; i++)
        {
            await c.Put($"Observation/{id}", Observation(value: $"{i}", more: $",\"id\":\"{id}\""));
        }
        await c.Send("DELETE", $"Observation/{id}");
        await c.Server.Notifications.QuietAsync(Cancel);
        Assert.Equal(6, hook.Waiting);
        for (var i = 1; i <= 6; i++)
        {
            Assert.Contains($"\"versionId\":\"{i}\"", (await hook.Next()).Body, StringComparison.Ordinal);
        }
    }

    [Fact]
    public async Task A_refused_notification_is_tried_again_then_dropped_and_counted()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start(new SandboxOptions { NotificationBackOff = TimeSpan.FromMilliseconds(1) });
        await c.Created(Subscription("Observation", hook.Url));
        hook.RefuseNext(3);
        var late = await c.Created(Observation());
        Assert.EndsWith(late, (await hook.Next()).Path, StringComparison.Ordinal);
        await c.Server.Notifications.QuietAsync(Cancel);
        hook.RefuseNext(4);
        await c.Created(Observation());
        var next = await c.Created(Observation());
        Assert.EndsWith(next, (await hook.Next()).Path, StringComparison.Ordinal);
        Assert.Equal(1, c.Server.Notifications.Dropped);
    }

    // Subscription.status: a client submits only requested or off; the server sets active or error.
    [Fact]
    public async Task Status_belongs_to_the_server()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        (await c.Post("Subscription", Subscription("Observation", hook.Url, status: "active"))).IsOutcome(422);
        var bad = await c.Created(Subscription("Observation?unheard-of=1", hook.Url));
        var stored = (await c.Get($"Subscription/{bad}")).Json;
        Assert.Equal("error", stored["status"]!.GetValue<string>());
        Assert.Contains("unheard-of", stored["error"]!.GetValue<string>(), StringComparison.Ordinal);
        var id = await c.Created(Subscription("Observation", hook.Url));
        await c.Put($"Subscription/{id}", Subscription("Observation", hook.Url, status: "off").Replace("\"status\"", $"\"id\":\"{id}\",\"status\"", StringComparison.Ordinal));
        await c.Created(Observation());
        await c.Server.Notifications.QuietAsync(Cancel);
        Assert.Equal(0, hook.Waiting);
    }

    // "requested" again is how a client renews (end, error); what is queued is not lost and the order holds.
    [Fact]
    public async Task Renewal_keeps_what_is_queued()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start(new SandboxOptions { NotificationBackOff = TimeSpan.FromMilliseconds(1), NotificationAttempts = 1000 });
        hook.RefuseNext(int.MaxValue);
        var id = await c.Created(Subscription("Observation", hook.Url));
        var first = await c.Created(Observation());
        Assert.Equal(200, (await c.Put($"Subscription/{id}", Subscription("Observation", hook.Url).Replace("\"status\"", $"\"id\":\"{id}\",\"status\"", StringComparison.Ordinal))).Status);
        var second = await c.Created(Observation());
        hook.RefuseNext(0);
        Assert.EndsWith(first, (await hook.Next()).Path, StringComparison.Ordinal);
        Assert.EndsWith(second, (await hook.Next()).Path, StringComparison.Ordinal);
        Assert.Equal([id], await c.Found($"Subscription?status=active&url={hook.Url}"));
    }

    [Fact]
    public async Task A_transaction_notifies_only_what_it_committed()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        await c.Created(Subscription("Observation", hook.Url));
        await c.Post("", $$"""
            {"resourceType":"Bundle","type":"transaction","entry":[{"resource":{{Observation()}},"request":{"method":"POST","url":"Observation"} },
            {"resource":{{Observation(status: "nonsense")}},"request":{"method":"POST","url":"Observation"} }]}
            """);
        await c.Server.Notifications.QuietAsync(Cancel);
        Assert.Equal(0, c.Server.Notifications.Delivered + c.Server.Notifications.Dropped);
    }
}
