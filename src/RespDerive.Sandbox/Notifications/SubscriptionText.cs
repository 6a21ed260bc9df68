using System.Text.Json.Nodes;
using RespDerive.Sandbox.Endpoint;
using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Notifications;

/// <summary>What a Subscription resource says, read once.</summary>
internal sealed record SubscriptionText(SearchQuery Criteria, Uri Endpoint, bool WithPayload, IReadOnlyList<(string Name, string Value)> Headers, DateTimeOffset? End)
{
    /// <summary>R4 Subscription.status: "A client can only submit subscription resources in the requested or off state".</summary>
    public static void RequireClientStatus(JsonObject subscription)
    {
        if (subscription.Text("status") is not ("requested" or "off"))
        {
            throw Refusal.Invalid("a client may submit a Subscription only as requested or off");
        }
    }

    /// <summary>The text, or the reason why this server cannot serve it.</summary>
    public static SubscriptionText Read(JsonObject subscription, string baseUrl)
    {
        var channel = subscription["channel"];
        if (channel.Text("type") != "rest-hook")
        {
            throw Refusal.Invalid("only rest-hook channels are served");
        }
        if (!Uri.TryCreate(channel.Text("endpoint"), UriKind.Absolute, out var endpoint) || endpoint.Scheme is not ("http" or "https"))
        {
            throw Refusal.Invalid("channel.endpoint is not an http URL");
        }
        var payload = channel.Text("payload");
        if (payload is not (null or "application/fhir+json" or "application/json"))
        {
            throw Refusal.Invalid("only application/fhir+json is sent as payload");
        }
        var criteria = subscription.Text("criteria") ?? "";
        var mark = criteria.IndexOf('?', StringComparison.Ordinal);
        var type = mark < 0 ? criteria : criteria[..mark];
        if (!ResourceRules.IsType(type))
        {
            throw Refusal.Invalid("criteria does not begin with a resource type");
        }
        var query = SearchQuery.Parse(type, mark < 0 ? "" : criteria[mark..], baseUrl);
        if (query.Ignored.Count > 0)
        {
            throw Refusal.Invalid($"criteria has parameters that are not supported: {string.Join(", ", query.Ignored)}");
        }
        return new SubscriptionText(query, endpoint, payload is not null, [.. Lines(channel?["header"] as JsonArray)], DateRange.TryParse(subscription.Text("end"))?.From);
    }

    private static IEnumerable<(string Name, string Value)> Lines(JsonArray? headers)
    {
        foreach (var line in (headers ?? []).Select(h => h?.GetValue<string>() ?? ""))
        {
            var colon = line.IndexOf(':', StringComparison.Ordinal);
            if (colon > 0)
            {
                yield return (line[..colon].Trim(), line[(colon + 1)..].Trim());
            }
        }
    }
}
