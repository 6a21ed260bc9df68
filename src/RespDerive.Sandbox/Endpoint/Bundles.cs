using System.Text.Json;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>POST to the base: batch (entries on their own) and transaction (all or nothing).</summary>
internal sealed class Bundles(Router router, Writing writing, ResourceStore store, Action<FhirRequest, FhirAnswer> journal, string baseUrl)
{
    public FhirAnswer Process(FhirRequest request)
    {
        var bundle = ResourceJson.Parse(request.Body);
        ResourceRules.RequireType(bundle, "Bundle");
        var entries = BundleEntry.All(bundle, baseUrl);
        var type = bundle.Text("type");
        FhirAnswer[] answers = type switch
        {
            "transaction" => new Transaction(writing, store, router.ReadOnly).Run(entries),
            "batch" => [.. entries.Select(e => router.Answer(e.Request))],
            _ => throw Refusal.BadRequest("Bundle.type must be transaction or batch"),
        };
        foreach (var entry in entries)
        {
            journal(entry.Request, answers[entry.Position]);
        }
        return new FhirAnswer(200, BundleWriter.Write($"{type}-response", null, [], entries, (json, entry) => Write(json, entry, answers[entry.Position], request)));
    }

    private static void Write(Utf8JsonWriter json, BundleEntry entry, FhirAnswer answer, FhirRequest request)
    {
        var failed = answer.Status >= 400;
        if (!failed && answer.Body.Length > 0 && (entry.Method == "GET" || request.Prefers("return=representation")))
        {
            json.WritePropertyName("resource");
            json.WriteRawValue(answer.Body, skipInputValidation: true);
        }
        json.WriteStartObject("response");
        json.WriteString("status", HttpStatus.Line(answer.Status));
        if (answer.About is { } about)
        {
            if (entry.Method is "POST" or "PUT")
            {
                json.WriteString("location", about.VersionedReference);
            }
            json.WriteString("etag", about.ETag);
            json.WriteString("lastModified", ResourceJson.Instant(about.LastUpdated));
        }
        if (failed)
        {
            json.WritePropertyName("outcome");
            json.WriteRawValue(answer.Body, skipInputValidation: true);
        }
        json.WriteEndObject();
    }
}

internal static class HttpStatus
{
    public static string Line(int status) => $"{status} {Microsoft.AspNetCore.WebUtilities.ReasonPhrases.GetReasonPhrase(status)}";
}
