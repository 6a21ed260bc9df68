using System.Text;
using System.Text.Json.Nodes;
using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>
/// What a posted resource must satisfy: the R4 model (cardinalities, required codes, formats) and a few rules
/// that the model classes do not carry.
/// </summary>
internal static class ResourceRules
{
    private static readonly HashSet<string> s_types = [.. ModelInfo.SupportedResources];

    public static bool IsType(string type) => s_types.Contains(type);

    /// <summary>The type of the body, which must be the one addressed.</summary>
    public static void RequireType(JsonObject resource, string type)
    {
        if (resource.Text("resourceType") is not { } given)
        {
            throw Refusal.Malformed("the body has no resourceType");
        }
        if (given != type)
        {
            throw Refusal.BadRequest($"the body is a {given}, the URL says {type}");
        }
    }

    public static void Check(JsonObject resource)
    {
        var text = Encoding.UTF8.GetString(ResourceJson.Bytes(resource));
        FhirJsonDeserializer.STRICT.TryDeserializeResource(text, out _, out var problems);
        var first = problems.FirstOrDefault();
        if (first is not null)
        {
            throw Refusal.Invalid(first.Message);
        }
        if (resource.Text("resourceType") == "Observation")
        {
            CheckObservation(resource);
        }
        foreach (var name in new[] { "subject", "patient" })
        {
            if (resource[name] is JsonObject subject && subject.Text("reference") is { } reference && !IsReference(reference))
            {
                throw Refusal.Invalid($"{name}.reference '{reference}' is not a reference");
            }
        }
    }

    private static void CheckObservation(JsonObject observation)
    {
        // obs-6: "dataAbsentReason SHALL only be present if Observation.value[x] is not present".
        if (observation.ContainsKey("dataAbsentReason") && observation.Any(p => p.Key.StartsWith("value", StringComparison.Ordinal)))
        {
            throw Refusal.Invalid("obs-6: dataAbsentReason beside a value");
        }
        // R4 Observation.performer allows people and organisations, not Device.
        if (observation["performer"] is JsonArray performers && performers.Any(p => p.Text("reference")?.StartsWith("Device/", StringComparison.Ordinal) ?? false))
        {
            throw Refusal.Invalid("Observation.performer may not be a Device in R4");
        }
    }

    private static bool IsReference(string reference)
    {
        if (reference.Contains("://", StringComparison.Ordinal) || reference.StartsWith("urn:", StringComparison.Ordinal) || reference.StartsWith('#'))
        {
            return true;
        }
        var parts = reference.Split('/');
        return parts.Length is 2 or 4 && IsType(parts[0]) && IsId(parts[1]) && (parts.Length == 2 || parts[2] == "_history");
    }

    /// <summary>R4 datatype id: 1 to 64 of A-Z a-z 0-9 - and dot.</summary>
    public static bool IsId(string id) => id.Length is > 0 and <= 64 && id.All(c => char.IsAsciiLetterOrDigit(c) || c is '-' or '.');
}
