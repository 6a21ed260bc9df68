using System.Text.Json;
using Hl7.Fhir.Model;

namespace RespDerive.Fhir.Writing;

/// <summary>
/// SHA-256 of what an Observation says, so that <c>verify</c> can tell whether it still says what we wrote.
/// Left out is what servers may change without changing the content: id, meta, narrative, and a literal reference that stands
/// beside an identifier (servers strip versions from it, and rewrite it in transactions).
/// </summary>
public static class ContentDigest
{
    /// <summary>Digest of a resource as rendered.</summary>
    public static string Of(Observation observation) => Of(FhirJson.Bytes(observation));

    /// <summary>Digest of a resource as read.</summary>
    /// <exception cref="JsonException">Not JSON.</exception>
    public static string Of(ReadOnlyMemory<byte> observation)
    {
        using var json = JsonDocument.Parse(observation);
        var root = json.RootElement;
        return CanonicalJson.Hash(CanonicalJson.Of(root, Keep));

        bool Keep(JsonElement parent, JsonProperty member) => member.Name switch
        {
            "id" or "meta" or "text" => !IsResource(parent),
            "reference" => !parent.TryGetProperty("identifier", out _),
            _ => true,
        };
    }

    private static bool IsResource(JsonElement element) => element.TryGetProperty("resourceType", out _);
}
