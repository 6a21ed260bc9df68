using System.Runtime.InteropServices;
using System.Text.Json;

namespace RespDerive.Fhir;

/// <summary>A Bundle taken apart.</summary>
public static class Bundles
{
    internal static readonly IReadOnlyDictionary<string, string> NoLinks = new Dictionary<string, string>();

    internal static bool IsBundle(JsonElement root) => root.Text("resourceType") == "Bundle";

    /// <summary>Entries that hold a resource; one that holds something else in its place is refused alone.</summary>
    internal static IEnumerable<FiledResource> Entries(long line, JsonElement bundle)
    {
        var links = Links(bundle);
        var index = -1;
        foreach (var entry in bundle.Get("entry") is { ValueKind: JsonValueKind.Array } entries ? entries.EnumerateArray() : default)
        {
            index++;
            if (entry.Get("resource") is not { } resource)
            {
                if (entry.ValueKind != JsonValueKind.Object)
                {
                    yield return new(line, index, default, null, links, Refusals.NotFhir);
                }

                continue; // a deletion in a history, say: it has no resource to read
            }

            yield return resource.ValueKind == JsonValueKind.Object
                ? new(line, index, JsonMarshal.GetRawUtf8Value(resource).ToArray(), entry.Text("fullUrl"), links, null)
                : new(line, index, default, entry.Text("fullUrl"), links, Refusals.NotFhir);
        }
    }

    /// <summary>
    /// Within a Bundle a URN stands for its entry. Where that entry's resource has an id, its references are turned into that
    /// id's, so that they mean the same outside this Bundle.
    /// </summary>
    /// <param name="bundle">The Bundle.</param>
    /// <returns>References by URN.</returns>
    public static IReadOnlyDictionary<string, string> Links(JsonElement bundle)
    {
        var links = new Dictionary<string, string>(StringComparer.Ordinal);
        foreach (var entry in bundle.Each("entry"))
        {
            if (entry.Text("fullUrl") is { } url && url.StartsWith("urn:", StringComparison.Ordinal)
                && entry.Get("resource") is { } resource && resource.Text("resourceType") is { } type && resource.Text("id") is { } id)
            {
                links.TryAdd(url, $"{type}/{id}");
            }
        }

        return links;
    }
}
