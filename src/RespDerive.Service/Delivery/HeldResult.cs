using System.Text.Json;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;

namespace RespDerive.Service.Delivery;

/// <summary>A result as the server holds it.</summary>
internal sealed record HeldResult(string? Version, string? Status, string Digest)
{
    public bool IsFinal => Status is "final" or "amended" or "corrected";

    public bool IsRetracted => Status == "entered-in-error";

    /// <summary>Null when it is no Observation.</summary>
    public static HeldResult? Read(ReadAnswer answer)
    {
        try
        {
            using var json = JsonDocument.Parse(answer.Body);
            var root = json.RootElement;
            return root.Text("resourceType") == "Observation"
                ? new HeldResult(root.Member("meta").Text("versionId") ?? answer.ETag, root.Text("status"), ContentDigest.Of(answer.Body))
                : null;
        }
        catch (Exception exception) when (exception is JsonException or InvalidOperationException)
        {
            return null;
        }
    }
}
