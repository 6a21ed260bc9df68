using System.Globalization;
using Microsoft.AspNetCore.WebUtilities;
using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>Searches and their pages. A page link names a kept result, so pages do not shift when resources change.</summary>
internal sealed class Searching(ResourceStore store, SandboxOptions options, string baseUrl)
{
    private const int KeptResults = 256;
    private const string TokenName = "result";
    private readonly Lock _gate = new();
    private readonly Dictionary<string, Result> _results = [];
    private readonly Queue<string> _oldest = [];
    private int _next;

    public FhirAnswer Search(FhirRequest request, string type, string? form = null)
    {
        if (QueryHelpers.ParseQuery(request.Query).TryGetValue(TokenName, out var token))
        {
            return Page(request, type, token.ToString());
        }
        var query = SearchQuery.Parse(type, request.Query, baseUrl, form);
        if (query.Ignored.Count > 0 && request.Prefers("handling=strict"))
        {
            throw Refusal.BadRequest($"not supported: {string.Join(", ", query.Ignored)}");
        }
        var found = store.Read(() => store.Find(query, stale: true));
        var self = $"{baseUrl}/{type}{query.Self}";
        if (query.CountOnly || query.Count == 0)
        {
            return new FhirAnswer(200, BundleWriter.Write("searchset", found.Count, [("self", self)], Array.Empty<StoredVersion>(), Entry));
        }
        var size = Math.Min(query.Count ?? options.DefaultPageSize, options.MaxPageSize);
        return Answer(new Result(type, found, size, self), 0);
    }

    private FhirAnswer Page(FhirRequest request, string type, string token)
    {
        var parameters = QueryHelpers.ParseQuery(request.Query);
        lock (_gate)
        {
            return _results.TryGetValue(token, out var result) && result.Type == type
                && int.TryParse(parameters["from"].ToString(), NumberStyles.None, CultureInfo.InvariantCulture, out var from)
                ? Answer(result with { Token = token }, from)
                : throw new Refusal(410, "expired", "this page is no longer kept; search again");
        }
    }

    private FhirAnswer Answer(Result result, int from)
    {
        var links = new List<(string, string)> { ("self", from == 0 ? result.Self : Link(result, from)) };
        if (from + result.Size < result.Found.Count)
        {
            links.Add(("next", Link(result, from + result.Size)));
        }
        if (from > 0)
        {
            links.Add(("previous", Link(result, Math.Max(0, from - result.Size))));
        }
        return new FhirAnswer(200, BundleWriter.Write("searchset", result.Found.Count, links, result.Found.Skip(from).Take(result.Size), Entry));
    }

    private string Link(Result result, int from)
    {
        result.Token ??= Keep(result);
        return $"{baseUrl}/{result.Type}?{TokenName}={result.Token}&from={from}";
    }

    private string Keep(Result result)
    {
        lock (_gate)
        {
            var token = $"r{++_next}";
            _results.Add(token, result);
            _oldest.Enqueue(token);
            if (_oldest.Count > KeptResults)
            {
                _results.Remove(_oldest.Dequeue());
            }
            return token;
        }
    }

    private void Entry(System.Text.Json.Utf8JsonWriter json, StoredVersion version)
    {
        json.WriteString("fullUrl", $"{baseUrl}/{version.Reference}");
        json.WritePropertyName("resource");
        json.WriteRawValue(version.Json, skipInputValidation: true);
        json.WriteStartObject("search");
        json.WriteString("mode", "match");
        json.WriteEndObject();
    }

    private sealed record Result(string Type, List<StoredVersion> Found, int Size, string Self)
    {
        public string? Token { get; set; }
    }
}
