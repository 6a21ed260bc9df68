using System.Text.Json;
using System.Text.Json.Nodes;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Fhir.Writing;

/// <summary>
/// A policy as canonical JSON with the keys of the policy file, defaults written out, all in canonical units.
/// Two files that mean the same have one document and one hash, whatever their spacing, order of keys or units.
/// </summary>
public static class PolicyDocument
{
    /// <summary>The document.</summary>
    public static byte[] Of(Policy policy)
    {
        var document = new JsonObject
        {
            ["validFrom"] = policy.ValidFrom?.UtcDateTime.ToString("yyyy-MM-dd'T'HH:mm:ss.FFFFFFF'Z'", System.Globalization.CultureInfo.InvariantCulture),
            ["pressure"] = policy.PressureMmHg,
            ["altitude"] = policy.AltitudeMetres,
            ["respiratoryQuotient"] = policy.RespiratoryQuotient,
            ["acceptSetPeep"] = policy.AcceptSetPeep,
            ["definitions"] = policy.Definitions is { } keys ? new JsonArray([.. keys.Order(StringComparer.Ordinal).Select(key => (JsonNode?)key)]) : null,
            ["tolerances"] = new JsonObject(policy.Tolerances.Select(entry => KeyValuePair.Create(entry.Key, (JsonNode?)Of(entry.Value)))),
            ["sources"] = new JsonObject(policy.Sources.Select(entry => KeyValuePair.Create(entry.Key, (JsonNode?)Of(entry.Value)))),
        };
        foreach (var absent in document.Where(member => member.Value is null).Select(member => member.Key).ToList())
        {
            document.Remove(absent);
        }

        return CanonicalJson.Of(JsonSerializer.SerializeToElement(document));
    }

    /// <summary>SHA-256 of the document, lower-case hex.</summary>
    public static string Hash(Policy policy) => CanonicalJson.Hash(Of(policy));

    /// <summary>The policy with its hash set.</summary>
    public static Policy WithHash(Policy policy) => policy with { Hash = Hash(policy) };

    private static JsonObject Of(Tolerance tolerance) => new()
    {
        ["as"] = tolerance.Rectangular ? "limit" : "deviation",
        ["absolute"] = tolerance.Absolute,
        ["relative"] = tolerance.Relative,
        ["sharedZero"] = tolerance.Zero,
        ["source"] = tolerance.Source,
    };

    private static JsonObject Of(SourceTiming timing) => new() { ["settings"] = new JsonObject { ["value"] = timing.SettingMaxAge.TotalHours, ["unit"] = "h" } };
}
