using System.Net.Http.Json;
using System.Text;
using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>A plain client of a FHIR server: what any other system would see.</summary>
internal sealed class FhirClient(string baseUrl) : IDisposable
{
    public const string ResultSystem = "https://respderive.example/fhir/result";
    private const string DerivedValue = "https://respderive.example/fhir/CodeSystem/derived-value";
    private readonly HttpClient _http = new();

    public string BaseUrl => baseUrl;

    public async Task<JsonObject> PutAsync(JsonObject resource)
    {
        using var content = Content(resource);
        using var response = await _http.PutAsync($"{baseUrl}/{resource["resourceType"]}/{resource["id"]}", content, Cancel);
        var text = await response.Content.ReadAsStringAsync(Cancel);
        Assert.True(response.IsSuccessStatusCode, $"{(int)response.StatusCode}: {text}");
        return JsonNode.Parse(text)!.AsObject();
    }

    public async Task DeleteAsync(string reference)
    {
        using var response = await _http.DeleteAsync($"{baseUrl}/{reference}", Cancel);
        response.EnsureSuccessStatusCode();
    }

    public async Task<JsonObject> ReadAsync(string reference) =>
        (await _http.GetFromJsonAsync<JsonObject>($"{baseUrl}/{reference}", Cancel))!;

    public async Task<IReadOnlyList<JsonObject>> SearchAsync(string query)
    {
        var found = new List<JsonObject>();
        for (var next = $"{baseUrl}/{query}"; next is not null;)
        {
            var page = (await _http.GetFromJsonAsync<JsonObject>(next, Cancel))!;
            found.AddRange((page["entry"]?.AsArray() ?? []).Select(entry => entry!["resource"]!.AsObject()));
            next = (page["link"]?.AsArray() ?? []).FirstOrDefault(link => (string?)link!["relation"] == "next")?["url"]?.ToString();
        }

        return found;
    }

    /// <summary>Every result of a patient, of one definition when given.</summary>
    public async Task<IReadOnlyList<JsonObject>> ResultsAsync(string patient, string? definition = null) =>
        [.. (await SearchAsync($"Observation?subject=Patient/{patient}&_count=500")).Where(one => one.ResultId() is not null
            && (definition is null || one["code"]!["coding"]!.AsArray().Any(coding => (string?)coding!["system"] == DerivedValue && (string?)coding["code"] == definition)))];

    public Task<IReadOnlyList<JsonObject>> ProvenancesAsync(JsonObject result) => SearchAsync($"Provenance?target=Observation/{result["id"]}&_count=500");

    /// <summary>Waits for the one result of a definition that meets a condition.</summary>
    public Task<JsonObject> ResultAsync(string patient, string definition, Func<JsonObject, bool> condition, Func<string>? otherwise = null) =>
        Until.Some(async () => await ResultsAsync(patient, definition) is [var only] && condition(only) ? only : null, $"{definition} of {patient}",
            async () => string.Join('\n', (await ResultsAsync(patient)).Select(one => one.ToJsonString())) + otherwise?.Invoke());

    public void Dispose() => _http.Dispose();

    public static HttpContent Content(JsonNode json) => new StringContent(json.ToJsonString(), Encoding.UTF8, "application/fhir+json");

    private static CancellationToken Cancel => TestContext.Current.CancellationToken;
}

/// <summary>Words for parts of results.</summary>
internal static class ResultReading
{
    public static string? ResultId(this JsonObject observation) =>
        observation["identifier"]?.AsArray().FirstOrDefault(one => (string?)one!["system"] == FhirClient.ResultSystem)?["value"]?.ToString();

    public static string Status(this JsonObject observation) => observation["status"]!.ToString();

    public static decimal? Value(this JsonObject observation) => (decimal?)observation["valueQuantity"]?["value"];

    public static string Version(this JsonObject resource) => resource["meta"]!["versionId"]!.ToString();

    public static string[] DerivedFrom(this JsonObject observation) =>
        [.. observation["derivedFrom"]!.AsArray().Select(one => one!["reference"]!.ToString()).Order(StringComparer.Ordinal)];

    public static string Activity(this JsonObject provenance) => provenance["activity"]!["coding"]![0]!["code"]!.ToString();

    /// <summary>References of entities with a role.</summary>
    public static string[] Entities(this JsonObject provenance, string role) =>
        [.. (provenance["entity"]?.AsArray() ?? []).Where(one => (string?)one!["role"] == role).Select(one => one!["what"]!["reference"]!.ToString()).Order(StringComparer.Ordinal)];
}
