using System.Text.Json.Nodes;
using RespDerive.Sandbox.Endpoint;

namespace RespDerive.Sandbox.Notifications;

/// <summary>
/// Follows the store: Subscriptions start and end feeds; any other change goes to the feeds whose criteria it meets.
/// Deletions are not notified (R4 Subscription: criteria apply to created and updated resources).
/// </summary>
internal sealed class Feeds(ResourceStore store, Faults faults, SandboxOptions options, string baseUrl) : IAsyncDisposable
{
    private readonly Dictionary<string, Feed> _feeds = [];
    private readonly List<Feed> _ended = [];
    private readonly HttpClient _http = new() { Timeout = TimeSpan.FromSeconds(10) };

    public NotificationCounts Counts { get; } = new();

    /// <summary>Called by the store, in commit order, under its lock.</summary>
    public void Follow(StoredVersion version)
    {
        if (version.Type == "Subscription")
        {
            Change(version);
        }
        if (version.Deleted)
        {
            return;
        }
        foreach (var feed in _feeds.Values)
        {
            var over = feed.Text.End is { } end && end <= version.CommittedAt;
            if (!over && feed.Text.Criteria.Type == version.Type && feed.Text.Criteria.Matches(version))
            {
                Notify(feed, version);
            }
        }
    }

    public async ValueTask DisposeAsync()
    {
        Feed[] all = store.Read<Feed[]>(() => [.. _ended, .. _feeds.Values]);
        foreach (var feed in all)
        {
            feed.Stop();
        }
        foreach (var feed in all)
        {
            await feed.DisposeAsync().ConfigureAwait(false);
        }
        _http.Dispose();
    }

    private void Notify(Feed feed, StoredVersion version)
    {
        if (faults.TakeDroppedNotification())
        {
            Counts.Lost();
            return;
        }
        feed.Enqueue(version);
        if (faults.TakeDuplicatedNotification())
        {
            feed.Enqueue(version);
        }
    }

    private void Change(StoredVersion version)
    {
        var resource = version.Json is { } json ? ResourceJson.Parse(json) : null;
        var status = resource.Text("status");
        if (status == "active")
        {
            return;
        }
        if (_feeds.Remove(version.Id, out var ended))
        {
            _ended.Add(ended);
            if (status == "requested")
            {
                ended.Finish();
            }
            else
            {
                ended.Stop();
            }
        }
        if (status == "requested")
        {
            Activate(version.Id, resource!, ended);
        }
    }

    private void Activate(string id, JsonObject resource, Feed? replaces)
    {
        try
        {
            _feeds.Add(id, new Feed(SubscriptionText.Read(resource, baseUrl), _http, Counts, options, replaces));
            resource["status"] = "active";
            resource.Remove("error");
        }
        catch (Refusal refusal)
        {
            resource["status"] = "error";
            resource["error"] = refusal.Message;
        }
        store.Write(() => store.Append("Subscription", id, "PUT", resource));
    }
}
