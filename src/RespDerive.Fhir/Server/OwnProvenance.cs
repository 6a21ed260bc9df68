using System.Text.Json;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Server;

/// <summary>A Provenance of ours as a server holds it.</summary>
/// <param name="Id">The server's id.</param>
/// <param name="OwnId">Our id of it: the same edition sent again has the same.</param>
/// <param name="Digest">Digest of the content it testifies to.</param>
/// <param name="Revision">Revision of the result; 0 when it does not say.</param>
public sealed record OwnProvenance(string Id, string OwnId, string Digest, int Revision)
{
    internal static OwnProvenance? Of(JsonElement json, Vocabulary words)
    {
        var revision = json.Items("target").SelectMany(target => target.Items("extension"))
            .FirstOrDefault(extension => extension.Text("url") == words.ResultRevision).Member("valuePositiveInt");
        return json.Text("resourceType") == "Provenance" && json.Text("id") is { } id
            && Value(json, words.ProvenanceId) is { } own && Value(json, words.ContentDigest) is { } digest
            ? new OwnProvenance(id, own, digest, revision.ValueKind == JsonValueKind.Number && revision.TryGetInt32(out var number) ? number : 0)
            : null;
    }

    private static string? Value(JsonElement json, string url) =>
        json.Items("extension").FirstOrDefault(extension => extension.Text("url") == url).Text("valueString");
}
