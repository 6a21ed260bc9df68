using static RespDerive.Sandbox.Tests.Endpoint.Client;

namespace RespDerive.Sandbox.Tests.Endpoint;

public sealed class FaultTests
{
    [Fact]
    public async Task Failing_requests_do_nothing_and_end_after_their_number()
    {
        await using var c = await Start();
        c.Server.Faults.FailNext(2, 500, "POST");
        (await c.Post("Observation", Observation())).IsOutcome(500);
        Assert.Equal(200, (await c.Get("metadata")).Status);
        (await c.Post("Observation", Observation())).IsOutcome(500);
        Assert.Equal(201, (await c.Post("Observation", Observation())).Status);
        Assert.Single(await c.Found("Observation"));
    }

    // RFC 6585 section 4: 429 may carry Retry-After.
    [Fact]
    public async Task Throttled_requests_say_when_to_come_back()
    {
        await using var c = await Start();
        c.Server.Faults.ThrottleNext(1, TimeSpan.FromSeconds(7));
        var reply = await c.Get("metadata");
        reply.IsOutcome(429);
        Assert.Equal(TimeSpan.FromSeconds(7), reply.RetryAfter);
    }

    [Fact]
    public async Task A_lost_response_leaves_the_write_in_place()
    {
        await using var c = await Start();
        c.Server.Faults.LoseNextResponses(1);
        Assert.Empty(await c.Found("Observation"));
        await Assert.ThrowsAsync<HttpRequestException>(() => c.Post("Observation", Observation()));
        Assert.Single(await c.Found("Observation"));
        Assert.Contains(c.Server.Journal.Entries, e => e is { Method: "POST", Status: 0, Version: 1 });
    }

    [Fact]
    public async Task A_stale_search_finds_a_resource_only_after_a_while()
    {
        var clock = new StoppedClock(DateTimeOffset.UnixEpoch);
        await using var c = await Start(new SandboxOptions { Clock = clock });
        c.Server.Faults.SearchStaleness = TimeSpan.FromSeconds(5);
        var id = await c.Created(Observation());
        Assert.Empty(await c.Found("Observation"));
        Assert.Equal(200, (await c.Get($"Observation/{id}")).Status);
        clock.Advance(TimeSpan.FromSeconds(5));
        Assert.Single(await c.Found("Observation"));
    }

    [Fact]
    public async Task Racing_conditional_creates_make_duplicates()
    {
        await using var c = await Start();
        var body = Observation(more: ",\"identifier\":[{\"system\":\"s\",\"value\":\"v\"}]");
        c.Server.Faults.RaceNextConditionalCreates(2);
        for (var i = 0; i < 3; i++)
        {
            await c.Post("Observation", body, ("If-None-Exist", "identifier=s|v"));
        }
        Assert.Equal(2, (await c.Found("Observation?identifier=s|v")).Count);
    }

    [Fact]
    public async Task Notifications_can_be_lost_or_doubled()
    {
        await using var hook = await Receiver.Start();
        await using var c = await Start();
        await c.Created(Subscription("Observation", hook.Url));
        c.Server.Faults.DropNextNotifications(1);
        await c.Created(Observation());
        c.Server.Faults.DuplicateNextNotifications(1);
        var id = await c.Created(Observation());
        Assert.EndsWith(id, (await hook.Next()).Path, StringComparison.Ordinal);
        Assert.EndsWith(id, (await hook.Next()).Path, StringComparison.Ordinal);
        await c.Server.Notifications.QuietAsync(Cancel);
        Assert.Equal((2, 1), (c.Server.Notifications.Delivered, c.Server.Notifications.Dropped));
    }

    [Fact]
    public async Task Cleared_faults_are_gone()
    {
        await using var c = await Start();
        c.Server.Faults.FailNext(5);
        c.Server.Faults.Delay = TimeSpan.FromDays(1);
        c.Server.Faults.Clear();
        Assert.Equal(200, (await c.Get("metadata")).Status);
    }
}
