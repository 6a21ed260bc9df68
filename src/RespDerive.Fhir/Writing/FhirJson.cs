using System.Text.Encodings.Web;
using System.Text.Json;
using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;

namespace RespDerive.Fhir.Writing;

/// <summary>Resources as FHIR JSON. Decimals keep their zeros and are written in plain notation.</summary>
public static class FhirJson
{
    private static readonly BaseFhirJsonSerializer Serializer = new(ModelInfo.ModelInspector);
    private static readonly JsonWriterOptions Compact = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };
    private static readonly JsonWriterOptions Indented = Compact with { Indented = true, NewLine = "\n" };

    /// <summary>UTF-8 without white space.</summary>
    public static byte[] Bytes(Resource resource) => Write(resource, Compact);

    /// <summary>UTF-8 for people.</summary>
    public static byte[] Readable(Resource resource) => Write(resource, Indented);

    /// <summary>Writes one NDJSON line.</summary>
    public static async System.Threading.Tasks.Task WriteLineAsync(Stream output, Resource resource, CancellationToken cancel = default)
    {
        await output.WriteAsync(Bytes(resource), cancel);
        await output.WriteAsync("\n"u8.ToArray(), cancel);
    }

    private static byte[] Write(Resource resource, JsonWriterOptions options)
    {
        using var stream = new MemoryStream();
        using (var writer = new Utf8JsonWriter(stream, options))
        {
            Serializer.Serialize(resource, writer);
        }

        return stream.ToArray();
    }
}
