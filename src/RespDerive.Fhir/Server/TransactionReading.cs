using System.Globalization;
using System.Text.Json;
using Hl7.Fhir.Model;

namespace RespDerive.Fhir.Server;

/// <summary>Reads a transaction-response entry by entry, since some servers answer 200 with failed entries inside.</summary>
internal static class TransactionReading
{
    /// <summary>One answer for each entry sent; null when the body does not give one for each.</summary>
    public static ServerAnswer[]? Of(byte[] body, Bundle sent, DateTimeOffset now)
    {
        try
        {
            using var json = JsonDocument.Parse(body);
            var entries = json.RootElement.Items("entry").ToList();
            return json.RootElement.Text("resourceType") == "Bundle" && entries.Count == sent.Entry.Count
                ? [.. entries.Zip(sent.Entry, (entry, request) => Of(entry, request, now))]
                : null;
        }
        catch (JsonException)
        {
            return null;
        }
    }

    private static ServerAnswer Of(JsonElement entry, Bundle.EntryComponent sent, DateTimeOffset now)
    {
        var response = entry.Member("response");
        var text = response.Text("status") ?? "";
        if (text.Length < 3 || !int.TryParse(text.AsSpan(0, 3), NumberStyles.None, CultureInfo.InvariantCulture, out var status))
        {
            return new ServerAnswer.Unknown("An entry has no status.");
        }

        if (status is < 200 or > 299)
        {
            var outcome = response.Member("outcome").ValueKind == JsonValueKind.Object ? response.Member("outcome") : entry.Member("resource");
            return DeliveryVerdict.Of(status, outcome.ValueKind == JsonValueKind.Object ? outcome.Raw() : default, null, null, now);
        }

        var type = sent.Resource!.TypeName;
        var landed = Landing.Of(entry.Member("resource"), type, response.Text("location"), response.Text("etag"))
            ?? (sent.Request?.Method == Bundle.HTTPVerb.PUT && sent.Resource.Id is { } id ? new ServerAnswer.Delivered(id, Landing.Version(response.Text("etag"))) : null);
        return landed is null
            ? new ServerAnswer.Unknown("An entry tells no id.")
            : landed with { Existed = status == 200 && sent.Request?.IfNoneExist is not null };
    }
}
