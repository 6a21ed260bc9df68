using System.Text.Json;
using RespDerive.Fhir;
using RespDerive.Fhir.Server;

namespace RespDerive.Service.Intake;

/// <summary>What a notification says: resources it brings, and references it only names.</summary>
/// <param name="Brought">Resources with content.</param>
/// <param name="Named">Relative references to be read.</param>
internal sealed record Notification(IReadOnlyList<Brought> Brought, IReadOnlyList<string> Named)
{
    private const int Deepest = 64;

    /// <summary>A resource, or a Bundle of resources and of a topic-based notification's focus references. Null when it is no JSON object with a resourceType.</summary>
    public static Notification? Read(byte[] body)
    {
        try
        {
            using var json = JsonDocument.Parse(body, new JsonDocumentOptions { MaxDepth = Deepest });
            return json.RootElement is { ValueKind: JsonValueKind.Object } root && root.Text("resourceType") is { } type
                ? type == "Bundle" ? OfBundle(root) : new Notification([new Brought(body, null)], [])
                : null;
        }
        catch (JsonException)
        {
            return null;
        }
    }

    private static Notification OfBundle(JsonElement bundle)
    {
        var brought = new List<Brought>();
        var named = new List<string>();
        var links = Bundles.Links(bundle);
        foreach (var entry in bundle.Items("entry"))
        {
            if (!entry.TryGetProperty("resource", out var resource) || resource.ValueKind != JsonValueKind.Object)
            {
                continue;
            }

            if (resource.Text("resourceType") is "Parameters" or "SubscriptionStatus")
            {
                named.AddRange(Focus(resource));
            }
            else
            {
                brought.Add(new Brought(JsonSerializer.SerializeToUtf8Bytes(resource), entry.Text("fullUrl")) { Links = Used(links, resource.GetRawText()) });
            }
        }

        return new Notification(brought, [.. named.Distinct(StringComparer.Ordinal)]);
    }

    /// <summary>The links that a resource uses; they are kept with it, since its URNs mean nothing outside this Bundle.</summary>
    private static Dictionary<string, string> Used(IReadOnlyDictionary<string, string> links, string resource) =>
        links.Where(link => resource.Contains($"\"{link.Key}\"", StringComparison.Ordinal)).ToDictionary(StringComparer.Ordinal);

    /// <summary>References called focus, wherever the status resource keeps them; the last two path segments make them relative.</summary>
    private static IEnumerable<string> Focus(JsonElement status)
    {
        var events = status.Items("parameter").Where(parameter => parameter.Text("name") == "notification-event").SelectMany(parameter => parameter.Items("part"))
            .Where(part => part.Text("name") == "focus").Select(part => part.Member("valueReference"))
            .Concat(status.Items("notificationEvent").Select(one => one.Member("focus")));
        foreach (var reference in events.Select(focus => focus.Text("reference")).OfType<string>())
        {
            var parts = reference.Split("/_history/")[0].Split('/', StringSplitOptions.RemoveEmptyEntries);
            if (parts.Length >= 2)
            {
                yield return $"{parts[^2]}/{parts[^1]}";
            }
        }
    }
}
