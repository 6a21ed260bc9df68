using System.Globalization;
using System.Net.Http.Headers;
using System.Text;
using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>A server and an HTTP client for it.</summary>
internal sealed class Client : IAsyncDisposable
{
    private readonly HttpClient _http = new();

    private Client(SandboxServer server) => Server = server;

    public SandboxServer Server { get; }

    public static CancellationToken Cancel => TestContext.Current.CancellationToken;

    public static async Task<Client> Start(SandboxOptions? options = null) =>
        new(await SandboxServer.StartAsync(options ?? new SandboxOptions(), Cancel));

    public async Task<Reply> Send(string method, string path, string? body = null, string type = "application/fhir+json", params (string Name, string Value)[] headers)
    {
        using var request = new HttpRequestMessage(new HttpMethod(method), path.StartsWith("http", StringComparison.Ordinal) ? path : $"{Server.BaseUrl}/{path}");
        if (body is not null)
        {
            request.Content = new ByteArrayContent(Encoding.UTF8.GetBytes(body)) { Headers = { ContentType = MediaTypeHeaderValue.Parse(type) } };
        }
        foreach (var (name, value) in headers)
        {
            request.Headers.TryAddWithoutValidation(name, value);
        }
        using var response = await _http.SendAsync(request, Cancel);
        var text = await response.Content.ReadAsStringAsync(Cancel);
        return new Reply((int)response.StatusCode, text, response.Headers.ETag?.ToString(), response.Headers.Location?.ToString(), response.Headers.RetryAfter?.Delta, response.Content.Headers.LastModified);
    }

    public Task<Reply> Get(string path, params (string, string)[] headers) => Send("GET", path, headers: headers);

    public Task<Reply> Post(string path, string body, params (string, string)[] headers) => Send("POST", path, body, headers: headers);

    public Task<Reply> Put(string path, string body, params (string, string)[] headers) => Send("PUT", path, body, headers: headers);

    public async Task<string> Created(string body)
    {
        var type = JsonNode.Parse(body)!["resourceType"]!.GetValue<string>();
        var reply = await Post(type, body);
        Assert.Equal(201, reply.Status);
        return reply.Json["id"]!.GetValue<string>();
    }

    /// <summary>Ids found, over all pages.</summary>
    public async Task<List<string>> Found(string search)
    {
        var ids = new List<string>();
        for (var next = search; next is not null;)
        {
            var reply = await Get(next);
            Assert.True(reply.Status == 200, reply.Text);
            ids.AddRange(reply.Entries.Select(e => e["resource"]!["id"]!.GetValue<string>()));
            next = reply.Link("next");
        }
        return ids;
    }

    public async ValueTask DisposeAsync()
    {
        _http.Dispose();
        await Server.DisposeAsync();
    }

    public static string Observation(string code = "2703-7", string value = "80", string at = "2026-01-02T10:00:00Z", string status = "final", string patient = "Patient/p1", string more = "") => $$"""
        {"resourceType":"Observation","status":"{{status}}","code":{"coding":[{"system":"http://loinc.org","code":"{{code}}"}]},
        "subject":{"reference":"{{patient}}"},"effectiveDateTime":"{{at}}",
        "valueQuantity":{"value":{{value}},"unit":"mm[Hg]","system":"http://unitsofmeasure.org","code":"mm[Hg]"}{{more}}}
        """;

    public static string Subscription(string criteria, string endpoint, bool payload = true, string status = "requested") => $$"""
        {"resourceType":"Subscription","status":"{{status}}","reason":"test","criteria":"{{criteria}}","channel":{"type":"rest-hook","endpoint":"{{endpoint}}",
        {{(payload ? "\"payload\":\"application/fhir+json\"," : "")}}"header":["Authorization: Bearer invented"] } }
        """;
}

internal sealed record Reply(int Status, string Text, string? ETag, string? Location, TimeSpan? RetryAfter, DateTimeOffset? LastModified)
{
    public JsonObject Json => JsonNode.Parse(Text)!.AsObject();

    public IEnumerable<JsonObject> Entries => (Json["entry"] as JsonArray ?? []).Select(e => e!.AsObject());

    public string? Link(string relation) =>
        (Json["link"] as JsonArray ?? []).FirstOrDefault(l => l!["relation"]!.GetValue<string>() == relation)?["url"]!.GetValue<string>();

    public int Total => Json["total"]!.GetValue<int>();

    public DateTimeOffset LastUpdated => DateTimeOffset.Parse(Json["meta"]!["lastUpdated"]!.GetValue<string>(), CultureInfo.InvariantCulture);

    public void IsOutcome(int status)
    {
        Assert.True(Status == status, $"{Status}: {Text}");
        Assert.Equal("OperationOutcome", Json["resourceType"]!.GetValue<string>());
    }
}
