using System.Text.Json;
using RespDerive.Fhir.Writing;

namespace RespDerive.Service.Delivery;

/// <summary>A result as the server holds it.</summary>
internal sealed record HeldResult(string? Version, string? Status, string Digest, IReadOnlyList<string> MethodSystems)
{
    /// <summary>Null when it is no Observation.</summary>
    public static HeldResult? Read(byte[] body)
    {
        try
        {
            using var json = JsonDocument.Parse(body);
            var root = json.RootElement;
            if (Text(root, "resourceType") != "Observation")
            {
                return null;
            }

            var systems = root.TryGetProperty("method", out var method) && method.TryGetProperty("coding", out var codings)
                ? codings.EnumerateArray().Select(coding => Text(coding, "system")).OfType<string>().ToArray() : [];
            return new HeldResult(root.TryGetProperty("meta", out var meta) ? Text(meta, "versionId") : null, Text(root, "status"), ContentDigest.Of(body), systems);
        }
        catch (Exception exception) when (exception is JsonException or InvalidOperationException)
        {
            return null;
        }
    }

    /// <summary>True when its method is one of ours, so that we wrote it.</summary>
    public bool OfThisSoftware(Vocabulary words) => MethodSystems.Contains(words.Method);

    private static string? Text(JsonElement json, string name) =>
        json.TryGetProperty(name, out var text) && text.ValueKind == JsonValueKind.String ? text.GetString() : null;
}
