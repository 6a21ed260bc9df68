using System.Text.Json;

namespace RespDerive.Fhir.Server;

/// <summary>Reads a searchset page without touching the resources in it.</summary>
internal static class PageReading
{
    /// <exception cref="SearchFailedException">No Bundle, or a next link to another host.</exception>
    public static (SearchPage Page, Uri? Next) Of(byte[] body, ServerBase server)
    {
        try
        {
            using var json = JsonDocument.Parse(body);
            var bundle = json.RootElement;
            if (bundle.Text("resourceType") != "Bundle")
            {
                throw Parked("not-a-bundle", "The answer to a search is no Bundle.");
            }

            var link = Link(bundle, "next");
            var next = link is null ? null : server.OfLink(link) ?? throw Parked("foreign-link", "The next link leads outside the server's base address.");
            var entries = bundle.Items("entry")
                .Select(entry => (Resource: entry.Member("resource"), FullUrl: entry.Text("fullUrl"), Mode: entry.Member("search").Text("mode")))
                .Where(entry => entry.Resource.ValueKind == JsonValueKind.Object && entry.Mode != "outcome")
                .Select(entry => new RawEntry(entry.Resource.Raw(), entry.FullUrl, entry.Mode))
                .ToList();
            return (new SearchPage(entries, Link(bundle, "self"), next is not null), next);
        }
        catch (JsonException)
        {
            throw Parked("not-json", "The answer to a search is no JSON.");
        }
    }

    private static string? Link(JsonElement bundle, string relation) =>
        bundle.Items("link").FirstOrDefault(link => link.Text("relation") == relation).Text("url");

    private static SearchFailedException Parked(string code, string text) => new(new ServerAnswer.Parked(code, text));
}
