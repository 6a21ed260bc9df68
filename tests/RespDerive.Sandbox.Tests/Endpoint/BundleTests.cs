using static RespDerive.Sandbox.Tests.Endpoint.Client;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>Rules quoted from FHIR R4 "RESTful API", "Transaction Processing Rules" and "batch/transaction".</summary>
public sealed class BundleTests
{
    private const string A = "urn:uuid:11111111-1111-4111-8111-111111111111";
    private const string B = "urn:uuid:22222222-2222-4222-8222-222222222222";

    // "the server SHALL replace all matching links in the bundle", also inside lists, whatever the order of entries.
    [Fact]
    public async Task Links_between_entries_are_resolved_everywhere()
    {
        await using var c = await Start();
        var reply = await c.Post("", Bundle("transaction",
            Entry("POST", "Provenance", Provenance(A, B), null),
            Entry("POST", "Observation", Observation(more: $",\"derivedFrom\":[{{\"reference\":\"Observation/z\"}},{{\"reference\":\"{B}\"}}]"), A),
            Entry("POST", "Observation", Observation(value: "40", more: $",\"identifier\":[{{\"system\":\"urn:ietf:rfc:3986\",\"value\":\"{B}\"}}]"), B)));
        Assert.True(reply.Status == 200, reply.Text);
        Assert.Equal("transaction-response", reply.Json["type"]!.GetValue<string>());
        var places = reply.Entries.Select(e => e["response"]!["location"]!.GetValue<string>()).ToArray();
        Assert.All(reply.Entries, e => Assert.StartsWith("201", e["response"]!["status"]!.GetValue<string>(), StringComparison.Ordinal));
        var (a, b) = (places[1].Split("/_history")[0], places[2].Split("/_history")[0]);
        var provenance = (await c.Get(places[0])).Json;
        Assert.Equal(a, provenance["target"]![0]!["reference"]!.GetValue<string>());
        Assert.Equal(b, provenance["entity"]![0]!["what"]!["reference"]!.GetValue<string>());
        Assert.Equal(["Observation/z", b], (await c.Get(a)).Json["derivedFrom"]!.AsArray().Select(r => r!["reference"]!.GetValue<string>()));
        // An identifier is a string, not a link.
        Assert.Equal(B, (await c.Get(b)).Json["identifier"]![0]!["value"]!.GetValue<string>());
    }

    // "either all or nothing": one failing entry leaves no trace of the others.
    [Theory]
    [InlineData("invalid")]
    [InlineData("ifMatch")]
    [InlineData("unresolved")]
    [InlineData("twice")]
    public async Task A_failing_entry_undoes_all(string how)
    {
        await using var c = await Start();
        await c.Put("Observation/x", Observation(more: ",\"id\":\"x\""));
        var bad = how switch
        {
            "invalid" => Entry("POST", "Observation", Observation(status: "nonsense"), null),
            "ifMatch" => Entry("PUT", "Observation/x", Observation(value: "1", more: ",\"id\":\"x\""), null, ",\"ifMatch\":\"W/\\\"9\\\"\""),
            "unresolved" => Entry("POST", "Observation", Observation(more: $",\"hasMember\":[{{\"reference\":\"{B}\"}}]"), null),
            _ => Entry("PUT", "Observation/y", Observation(value: "1", more: ",\"id\":\"y\""), null),
        };
        var reply = await c.Post("", Bundle("transaction", Entry("POST", "Observation", Observation(), A), Entry("PUT", "Observation/y", Observation(more: ",\"id\":\"y\""), null), bad));
        reply.IsOutcome(how switch { "invalid" => 422, "ifMatch" => 412, _ => 400 });
        Assert.Equal(["x"], await c.Found("Observation"));
        (await c.Get("Observation/y")).IsOutcome(404);
        Assert.Equal("W/\"1\"", (await c.Get("Observation/x")).ETag);
    }

    // Conditional create inside a transaction: an existing match takes the place of the entry, links go to it.
    [Fact]
    public async Task Conditional_create_in_a_transaction_links_to_the_existing_resource()
    {
        await using var c = await Start();
        var existing = await c.Created(Observation(more: ",\"identifier\":[{\"system\":\"urn:example:own\",\"value\":\"k\"}]"));
        var reply = await c.Post("", Bundle("transaction",
            Entry("POST", "Observation", Observation(value: "1"), A, ",\"ifNoneExist\":\"identifier=urn:example:own|k\""),
            Entry("POST", "Provenance", Provenance(A, "Observation?identifier=urn:example:own|k"), null)));
        Assert.True(reply.Status == 200, reply.Text);
        Assert.StartsWith("200", reply.Entries.First()["response"]!["status"]!.GetValue<string>(), StringComparison.Ordinal);
        var provenance = (await c.Get(reply.Entries.Last()["response"]!["location"]!.GetValue<string>())).Json;
        Assert.Equal($"Observation/{existing}", provenance["target"]![0]!["reference"]!.GetValue<string>());
        Assert.Equal($"Observation/{existing}", provenance["entity"]![0]!["what"]!["reference"]!.GetValue<string>());
    }

    // "DELETE, POST, PUT, GET": the GET sees what the others did.
    [Fact]
    public async Task Entries_run_in_the_order_of_the_rules()
    {
        await using var c = await Start();
        var old = await c.Created(Observation(code: "2019-8"));
        var reply = await c.Post("", Bundle("transaction",
            Entry("GET", "Observation?code=2703-7,2019-8", null, null),
            Entry("PUT", "Observation/n", Observation(more: ",\"id\":\"n\""), null),
            Entry("DELETE", $"Observation/{old}", null, null)));
        Assert.Equal("n", Assert.Single(reply.Entries.First()["resource"]!["entry"]!.AsArray())!["resource"]!["id"]!.GetValue<string>());
        Assert.StartsWith("204", reply.Entries.Last()["response"]!["status"]!.GetValue<string>(), StringComparison.Ordinal);
    }

    // "batch": each entry on its own; errors stand in the entry's response.outcome.
    [Fact]
    public async Task A_batch_keeps_what_succeeded()
    {
        await using var c = await Start();
        var reply = await c.Post("", Bundle("batch", Entry("POST", "Observation", Observation(status: "nonsense"), null), Entry("POST", "Observation", Observation(), null)));
        Assert.Equal(["422", "201"], reply.Entries.Select(e => e["response"]!["status"]!.GetValue<string>()[..3]));
        Assert.Equal("OperationOutcome", reply.Entries.First()["response"]!["outcome"]!["resourceType"]!.GetValue<string>());
        Assert.Single(await c.Found("Observation"));
        (await c.Post("", Bundle("collection"))).IsOutcome(400);
    }

    private static string Bundle(string type, params string[] entries) => $$"""{"resourceType":"Bundle","type":"{{type}}","entry":[{{string.Join(',', entries)}}]}""";

    private static string Entry(string method, string url, string? resource, string? fullUrl, string more = "") =>
        $$"""{ {{(fullUrl is null ? "" : $"\"fullUrl\":\"{fullUrl}\",")}}{{(resource is null ? "" : $"\"resource\":{resource},")}} "request":{"method":"{{method}}","url":"{{url}}"{{more}}} }""";

    private static string Provenance(string target, string source) => $$"""
        {"resourceType":"Provenance","target":[{"reference":"{{target}}"}],"recorded":"2026-01-02T10:00:00Z",
        "agent":[{"who":{"reference":"Device/d1"} }],"entity":[{"role":"source","what":{"reference":"{{source}}"} }]}
        """;
}
