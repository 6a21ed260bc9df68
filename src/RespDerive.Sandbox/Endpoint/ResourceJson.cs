using System.Globalization;
using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>Reading and writing of resources as JSON nodes; numbers keep the text they came with.</summary>
internal static class ResourceJson
{
    public static readonly JsonSerializerOptions Written = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    private static readonly JsonDocumentOptions s_reading = new() { AllowDuplicateProperties = false, MaxDepth = 64 };

    public static JsonObject Parse(ReadOnlySpan<byte> body)
    {
        if (body.IsEmpty)
        {
            throw Refusal.Malformed("the body is empty");
        }
        try
        {
            return JsonNode.Parse(body, documentOptions: s_reading) as JsonObject ?? throw Refusal.Malformed("the body is not a JSON object");
        }
        catch (JsonException)
        {
            throw Refusal.Malformed("the body is not JSON");
        }
    }

    public static string? Text(this JsonNode? node, string name) =>
        node is JsonObject o && o.TryGetPropertyValue(name, out var value) && value is JsonValue v && v.TryGetValue(out string? text) ? text : null;

    /// <summary>The bytes to store, with server-owned id, version and instant; the rest of <c>meta</c> is kept.</summary>
    public static byte[] Stamp(JsonObject resource, string id, int version, DateTimeOffset lastUpdated)
    {
        var stamped = new JsonObject { ["resourceType"] = resource["resourceType"]!.DeepClone(), ["id"] = id };
        var meta = resource["meta"] is JsonObject given ? (JsonObject)given.DeepClone() : [];
        meta["versionId"] = version.ToString(CultureInfo.InvariantCulture);
        meta["lastUpdated"] = Instant(lastUpdated);
        stamped["meta"] = meta;
        foreach (var (name, value) in resource)
        {
            if (name is not ("resourceType" or "id" or "meta"))
            {
                stamped[name] = value?.DeepClone();
            }
        }
        return Bytes(stamped);
    }

    public static byte[] Bytes(JsonNode node) => JsonSerializer.SerializeToUtf8Bytes(node, Written);

    public static string Instant(DateTimeOffset at) => at.UtcDateTime.ToString("yyyy-MM-dd'T'HH:mm:ss.fff'Z'", CultureInfo.InvariantCulture);
}
