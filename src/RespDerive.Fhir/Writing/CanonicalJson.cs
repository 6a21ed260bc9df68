using System.Buffers;
using System.Globalization;
using System.Security.Cryptography;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace RespDerive.Fhir.Writing;

/// <summary>
/// One byte sequence for one JSON content: members in ordinal order, no white space, numbers in plain notation without trailing zeros.
/// Servers drop trailing zeros and reorder members; a digest of this form survives both.
/// </summary>
public static class CanonicalJson
{
    private static readonly JsonWriterOptions Options = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    /// <summary>Canonical UTF-8.</summary>
    /// <param name="json">The content.</param>
    /// <param name="keep">Members to keep, asked with the object they are in; null keeps all.</param>
    public static byte[] Of(JsonElement json, Func<JsonElement, JsonProperty, bool>? keep = null)
    {
        var buffer = new ArrayBufferWriter<byte>();
        using (var writer = new Utf8JsonWriter(buffer, Options))
        {
            Write(writer, json, keep);
        }

        return buffer.WrittenSpan.ToArray();
    }

    /// <summary>SHA-256, lower-case hex: 64 characters, which fit a FHIR id.</summary>
    public static string Hash(ReadOnlySpan<byte> canonical) => Convert.ToHexStringLower(SHA256.HashData(canonical));

    private static void Write(Utf8JsonWriter writer, JsonElement json, Func<JsonElement, JsonProperty, bool>? keep)
    {
        switch (json.ValueKind)
        {
            case JsonValueKind.Object:
                writer.WriteStartObject();
                foreach (var member in json.EnumerateObject().Where(member => keep is null || keep(json, member)).OrderBy(member => member.Name, StringComparer.Ordinal))
                {
                    writer.WritePropertyName(member.Name);
                    Write(writer, member.Value, keep);
                }

                writer.WriteEndObject();
                break;
            case JsonValueKind.Array:
                writer.WriteStartArray();
                foreach (var item in json.EnumerateArray())
                {
                    Write(writer, item, keep);
                }

                writer.WriteEndArray();
                break;
            case JsonValueKind.Number:
                writer.WriteRawValue(Number(json));
                break;
            default:
                json.WriteTo(writer);
                break;
        }
    }

    private static string Number(JsonElement json) => json.TryGetDecimal(out var number)
        ? number == 0 ? "0" : (number / 1.0000000000000000000000000000m).ToString(CultureInfo.InvariantCulture)
        : json.GetRawText();
}
