using System.Runtime.InteropServices;
using System.Text.Json;

namespace RespDerive.Fhir.Server;

/// <summary>Reading of foreign JSON that never throws for a missing or wrong member.</summary>
public static class JsonReading
{
    /// <summary>A member; undefined when there is none, or no object to have it.</summary>
    public static JsonElement Member(this JsonElement json, string name) =>
        json.ValueKind == JsonValueKind.Object && json.TryGetProperty(name, out var value) ? value : default;

    /// <summary>A string; null when there is none.</summary>
    public static string? Text(this JsonElement json, string name) =>
        json.Member(name) is { ValueKind: JsonValueKind.String } value ? value.GetString() : null;

    /// <summary>The items of an array; none when there is no array.</summary>
    public static IEnumerable<JsonElement> Items(this JsonElement json, string name) =>
        json.Member(name) is { ValueKind: JsonValueKind.Array } list ? list.EnumerateArray() : [];

    /// <summary>The bytes as they stand in the document.</summary>
    public static byte[] Raw(this JsonElement json) => JsonMarshal.GetRawUtf8Value(json).ToArray();
}
