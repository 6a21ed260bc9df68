using System.Globalization;
using System.Text.Json;

namespace RespDerive.Fhir;

/// <summary>
/// Looking into JSON that may have any shape: what is absent or of the wrong type is null or empty, never an exception,
/// so that one bad element cannot sink a resource.
/// </summary>
internal static class Json
{
    private static readonly JsonDocumentOptions Strict = new() { MaxDepth = 64 };

    /// <summary>Parses; null when it is not JSON. A byte-order mark is tolerated.</summary>
    public static JsonDocument? Parse(ReadOnlyMemory<byte> utf8)
    {
        try
        {
            return JsonDocument.Parse(WithoutMark(utf8), Strict);
        }
        catch (JsonException)
        {
            return null;
        }
    }

    public static ReadOnlyMemory<byte> WithoutMark(ReadOnlyMemory<byte> utf8) =>
        utf8.Span.StartsWith("\uFEFF"u8) ? utf8[3..] : utf8;

    public static JsonElement? Get(this JsonElement element, string name) =>
        element.ValueKind == JsonValueKind.Object && element.TryGetProperty(name, out var found) && found.ValueKind != JsonValueKind.Null ? found : null;

    /// <summary>A string that is not blank.</summary>
    public static string? Text(this JsonElement element, string name) => element.Get(name) is { } found ? AsText(found) : null;

    /// <summary>A number, exact to 28 digits; null when it is none or too large.</summary>
    public static decimal? Number(this JsonElement element, string name) =>
        element.Get(name) is { ValueKind: JsonValueKind.Number } found
        && decimal.TryParse(found.GetRawText(), NumberStyles.Float, CultureInfo.InvariantCulture, out var number) ? number : null;

    /// <summary>The objects of an array; an object in the place of an array counts as its only item.</summary>
    public static IEnumerable<JsonElement> Each(this JsonElement element, string name) => element.Get(name) switch
    {
        { ValueKind: JsonValueKind.Array } array => array.EnumerateArray().Where(item => item.ValueKind == JsonValueKind.Object),
        { ValueKind: JsonValueKind.Object } single => [single],
        _ => [],
    };

    private static string? AsText(JsonElement element)
    {
        if (element.ValueKind != JsonValueKind.String)
        {
            return null;
        }

        try
        {
            return element.GetString() is { } text && !string.IsNullOrWhiteSpace(text) ? text : null;
        }
        catch (InvalidOperationException)
        {
            return null; // half a surrogate pair: JSON by its grammar, but no text
        }
    }
}
