using System.Runtime.InteropServices;
using System.Text.Json;

namespace RespDerive.Fhir.Server;

/// <summary>Reading of foreign JSON that never throws for a missing or wrong member.</summary>
internal static class JsonReading
{
    public static JsonElement Member(this JsonElement json, string name) =>
        json.ValueKind == JsonValueKind.Object && json.TryGetProperty(name, out var value) ? value : default;

    public static string? Text(this JsonElement json, string name) =>
        json.Member(name) is { ValueKind: JsonValueKind.String } value ? value.GetString() : null;

    public static IEnumerable<JsonElement> Items(this JsonElement json, string name) =>
        json.Member(name) is { ValueKind: JsonValueKind.Array } list ? list.EnumerateArray() : [];

    public static byte[] Raw(this JsonElement json) => JsonMarshal.GetRawUtf8Value(json).ToArray();
}
