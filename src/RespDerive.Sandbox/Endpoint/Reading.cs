using System.Globalization;
using System.Text.Json;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>read, vread and the history of one resource (R4 RESTful API).</summary>
internal sealed class Reading(ResourceStore store, string baseUrl)
{
    public FhirAnswer Read(FhirRequest request, string type, string id)
    {
        var current = store.Read(() => store.Current(type, id)) ?? throw Refusal.NotFound($"{type}/{id}");
        if (current.Deleted)
        {
            throw Refusal.Gone($"{type}/{id}");
        }
        return request.IfNoneMatch is { } tag && Preconditions.Version(tag) == current.Version
            ? new FhirAnswer(304, []) { About = current }
            : FhirAnswer.Of(current);
    }

    public FhirAnswer ReadVersion(string type, string id, string version)
    {
        var history = store.Read<IReadOnlyList<StoredVersion>>(() => [.. store.History(type, id)]);
        var found = int.TryParse(version, NumberStyles.None, CultureInfo.InvariantCulture, out var number) && number >= 1 && number <= history.Count
            ? history[number - 1]
            : throw Refusal.NotFound($"{type}/{id}/_history/{version}");
        return found.Deleted ? throw Refusal.Gone(found.VersionedReference) : FhirAnswer.Of(found);
    }

    public FhirAnswer History(string type, string id)
    {
        var history = store.Read<IReadOnlyList<StoredVersion>>(() => [.. store.History(type, id).Reverse()]);
        if (history.Count == 0)
        {
            throw Refusal.NotFound($"{type}/{id}");
        }
        return new FhirAnswer(200, BundleWriter.Write("history", history.Count, [("self", $"{baseUrl}/{type}/{id}/_history")], history, (json, version) =>
        {
            json.WriteString("fullUrl", $"{baseUrl}/{version.Reference}");
            if (version.Json is { } bytes)
            {
                json.WritePropertyName("resource");
                json.WriteRawValue(bytes, skipInputValidation: true);
            }
            json.WriteStartObject("request");
            json.WriteString("method", version.Method);
            json.WriteString("url", version.Method == "POST" ? version.Type : version.Reference);
            json.WriteEndObject();
            json.WriteStartObject("response");
            json.WriteString("status", version.Method == "DELETE" ? "204" : version.Version == 1 ? "201" : "200");
            json.WriteString("etag", version.ETag);
            json.WriteString("lastModified", ResourceJson.Instant(version.LastUpdated));
            json.WriteEndObject();
        }));
    }
}

/// <summary>Writes Bundles straight from stored bytes.</summary>
internal static class BundleWriter
{
    public static byte[] Write<T>(string type, int? total, IEnumerable<(string Relation, string Url)> links, IEnumerable<T> entries, Action<Utf8JsonWriter, T> entry)
    {
        using var buffer = new MemoryStream();
        using (var json = new Utf8JsonWriter(buffer, new JsonWriterOptions { Encoder = ResourceJson.Written.Encoder }))
        {
            json.WriteStartObject();
            json.WriteString("resourceType", "Bundle");
            json.WriteString("type", type);
            if (total is { } count)
            {
                json.WriteNumber("total", count);
            }
            var first = true;
            foreach (var (relation, url) in links)
            {
                if (first)
                {
                    json.WriteStartArray("link");
                }
                first = false;
                json.WriteStartObject();
                json.WriteString("relation", relation);
                json.WriteString("url", url);
                json.WriteEndObject();
            }
            if (!first)
            {
                json.WriteEndArray();
            }
            first = true;
            foreach (var item in entries)
            {
                if (first)
                {
                    json.WriteStartArray("entry");
                }
                first = false;
                json.WriteStartObject();
                entry(json, item);
                json.WriteEndObject();
            }
            if (!first)
            {
                json.WriteEndArray();
            }
            json.WriteEndObject();
        }
        return buffer.ToArray();
    }
}
