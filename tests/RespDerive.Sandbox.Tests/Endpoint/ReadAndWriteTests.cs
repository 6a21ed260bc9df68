using Hl7.Fhir.Serialization;
using static RespDerive.Sandbox.Tests.Endpoint.Client;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>Rules quoted from FHIR R4 "RESTful API" (hl7.org/fhir/R4/http.html); section names beside each check.</summary>
public sealed class ReadAndWriteTests
{
    // R4 http, "create": 201 with Location, ETag and Last-Modified; the server sets id and meta.
    [Fact]
    public async Task Create_answers_201_with_location_etag_and_instant()
    {
        await using var c = await Start();
        var reply = await c.Post("Observation", Observation(more: ",\"id\":\"mine\""));
        Assert.Equal(201, reply.Status);
        var id = reply.Json["id"]!.GetValue<string>();
        Assert.NotEqual("mine", id);
        Assert.Equal($"{c.Server.BaseUrl}/Observation/{id}/_history/1", reply.Location);
        Assert.Equal("W/\"1\"", reply.ETag);
        Assert.Equal("1", reply.Json["meta"]!["versionId"]!.GetValue<string>());
        Assert.NotNull(reply.LastModified);
    }

    // R4 datatypes, decimal: "the precision of the decimal value has significance".
    [Theory]
    [InlineData("7.40")]
    [InlineData("0.50")]
    [InlineData("100")]
    [InlineData("1.2345678901234567890123456789")]
    public async Task Decimals_come_back_as_they_were_sent(string value)
    {
        await using var c = await Start();
        var id = await c.Created(Observation(value: value));
        Assert.Contains($"\"value\":{value},", (await c.Get($"Observation/{id}")).Text, StringComparison.Ordinal);
    }

    // R4 http, "read", "vread", "history": old versions stay readable, newest first in the history.
    [Fact]
    public async Task Each_version_stays_readable()
    {
        await using var c = await Start();
        var id = await c.Created(Observation(value: "80"));
        var second = await c.Put($"Observation/{id}", Observation(value: "81", status: "corrected", more: $",\"id\":\"{id}\""));
        Assert.Equal(200, second.Status);
        Assert.Equal("W/\"2\"", second.ETag);
        Assert.Contains("\"value\":80,", (await c.Get($"Observation/{id}/_history/1")).Text, StringComparison.Ordinal);
        Assert.Contains("\"value\":81,", (await c.Get($"Observation/{id}/_history/2")).Text, StringComparison.Ordinal);
        var history = await c.Get($"Observation/{id}/_history");
        Assert.Equal("history", history.Json["type"]!.GetValue<string>());
        Assert.Equal(["PUT", "POST"], history.Entries.Select(e => e["request"]!["method"]!.GetValue<string>()));
        (await c.Get($"Observation/{id}/_history/3")).IsOutcome(404);
    }

    // R4 http, "read": 404 for unknown, 410 for deleted; "delete": 204, also when there is nothing left.
    [Fact]
    public async Task Deleted_is_gone_and_unknown_is_not_found()
    {
        await using var c = await Start();
        (await c.Get("Observation/nobody")).IsOutcome(404);
        (await c.Get("Nonsense/1")).IsOutcome(404);
        var id = await c.Created(Observation());
        Assert.Equal(204, (await c.Send("DELETE", $"Observation/{id}")).Status);
        Assert.Equal(204, (await c.Send("DELETE", $"Observation/{id}")).Status);
        (await c.Get($"Observation/{id}")).IsOutcome(410);
        (await c.Get($"Observation/{id}/_history/2")).IsOutcome(410);
        Assert.Equal(200, (await c.Get($"Observation/{id}/_history/1")).Status);
        Assert.Empty(await c.Found("Observation"));
        Assert.Equal(201, (await c.Put($"Observation/{id}", Observation(more: $",\"id\":\"{id}\""))).Status);
        Assert.Equal("W/\"3\"", (await c.Get($"Observation/{id}")).ETag);
    }

    // R4 http, "update": the body's id must equal the URL's; unknown id creates it (201).
    [Fact]
    public async Task Update_of_an_unknown_id_creates_it()
    {
        await using var c = await Start();
        Assert.Equal(201, (await c.Put("Observation/own-1", Observation(more: ",\"id\":\"own-1\""))).Status);
        (await c.Put("Observation/own-2", Observation(more: ",\"id\":\"other\""))).IsOutcome(400);
        (await c.Put("Observation/own-2", Observation())).IsOutcome(400);
        (await c.Put("Observation/bad_id", Observation(more: ",\"id\":\"bad_id\""))).IsOutcome(400);
    }

    // R4 http, "Managing Resource Contention": If-Match with another version than the current answers 412.
    [Fact]
    public async Task If_match_guards_against_lost_updates()
    {
        await using var c = await Start();
        var id = await c.Created(Observation());
        var body = Observation(value: "81", more: $",\"id\":\"{id}\"");
        Assert.Equal(200, (await c.Put($"Observation/{id}", body, ("If-Match", "W/\"1\""))).Status);
        (await c.Put($"Observation/{id}", body, ("If-Match", "W/\"1\""))).IsOutcome(412);
        (await c.Put("Observation/absent", Observation(more: ",\"id\":\"absent\""), ("If-Match", "W/\"1\""))).IsOutcome(412);
        Assert.Equal("W/\"2\"", (await c.Get($"Observation/{id}")).ETag);
        Assert.Equal(304, (await c.Get($"Observation/{id}", ("If-None-Match", "W/\"2\""))).Status);
    }

    // R4 http, "Conditional create": no match 201, one match 200 and nothing created, several 412.
    [Fact]
    public async Task Conditional_create_creates_once()
    {
        await using var c = await Start();
        var body = Observation(more: ",\"identifier\":[{\"system\":\"urn:example:own\",\"value\":\"a|b\"}]");
        (string, string) condition = ("If-None-Exist", "identifier=urn:example:own%7Ca%5C%7Cb");
        var first = await c.Post("Observation", body, condition);
        Assert.Equal(201, first.Status);
        var second = await c.Post("Observation", body, condition);
        Assert.Equal(200, second.Status);
        Assert.Equal(first.Location, second.Location);
        await c.Created(body);
        (await c.Post("Observation", body, condition)).IsOutcome(412);
        (await c.Post("Observation", body, ("If-None-Exist", "nonsense=1"))).IsOutcome(412);
    }

    // R4 http, "Conditional update": no match creates, one match updates, several 412; another id in the body 400.
    [Fact]
    public async Task Conditional_update_finds_its_resource()
    {
        await using var c = await Start();
        const string url = "Observation?identifier=urn:example:own|k";
        const string identifier = ",\"identifier\":[{\"system\":\"urn:example:own\",\"value\":\"k\"}]";
        Assert.Equal(201, (await c.Put(url, Observation(more: identifier))).Status);
        var again = await c.Put(url, Observation(value: "82", more: identifier));
        Assert.Equal((200, "W/\"2\""), (again.Status, again.ETag));
        (await c.Put(url, Observation(more: identifier + ",\"id\":\"x\""))).IsOutcome(400);
        await c.Created(Observation(more: identifier));
        (await c.Put(url, Observation(more: identifier))).IsOutcome(412);
    }

    // R4 http, "create": 400 not parseable or against basic rules, 404 unknown type, 422 against the resource's rules; 405 and 415 of RFC 9110.
    [Fact]
    public async Task Bad_bodies_are_refused_with_an_outcome()
    {
        await using var c = await Start();
        (await c.Post("Observation", "{")).IsOutcome(400);
        (await c.Post("Observation", "[]")).IsOutcome(400);
        (await c.Post("Observation", "")).IsOutcome(400);
        (await c.Post("Observation", "{\"status\":\"final\",\"status\":\"final\"}")).IsOutcome(400);
        (await c.Post("Observation", "{\"status\":\"final\"}")).IsOutcome(400);
        (await c.Post("Patient", Observation())).IsOutcome(400);
        (await c.Post("Observation", Observation(status: "nonsense"))).IsOutcome(422);
        (await c.Post("Observation", "{\"resourceType\":\"Observation\",\"status\":\"final\"}")).IsOutcome(422);
        (await c.Post("Observation", Observation(at: "2026-13-45"))).IsOutcome(422);
        (await c.Post("Observation", Observation(patient: "nowhere"))).IsOutcome(422);
        (await c.Post("Observation", Observation(more: ",\"dataAbsentReason\":{\"text\":\"x\"}"))).IsOutcome(422);
        (await c.Post("Observation", Observation(more: ",\"performer\":[{\"reference\":\"Device/1\"}]"))).IsOutcome(422);
        (await c.Post("", "{\"resourceType\":\"Bundle\",\"type\":\"batch\",\"entry\":{}}")).IsOutcome(400);
        (await c.Send("PATCH", "Observation/1", "{}")).IsOutcome(405);
        (await c.Send("POST", "Observation", "<Observation/>", "application/fhir+xml")).IsOutcome(415);
    }

    [Fact]
    public async Task Without_validation_a_defective_resource_can_be_planted()
    {
        await using var c = await Start(new SandboxOptions { Validate = false });
        await c.Created(Observation(status: "nonsense", value: "\"80\""));
    }

    // R4 http, "Managing Return Content": Prefer return=minimal, representation, OperationOutcome.
    [Fact]
    public async Task Prefer_chooses_the_answer_body()
    {
        await using var c = await Start();
        Assert.Equal("", (await c.Post("Observation", Observation(), ("Prefer", "return=minimal"))).Text);
        (await c.Post("Observation", Observation(), ("Prefer", "return=OperationOutcome"))).IsOutcome(201);
    }

    // R4 resource, meta: each version has its own lastUpdated; here strictly later than every earlier write of the server.
    [Fact]
    public async Task Last_updated_is_strictly_monotonic_even_when_the_clock_stands_still()
    {
        await using var c = await Start(new SandboxOptions { Clock = new StoppedClock(DateTimeOffset.UnixEpoch) });
        var instants = new List<DateTimeOffset>();
        for (var i = 0; i < 5; i++)
        {
            instants.Add((await c.Post("Observation", Observation())).LastUpdated);
        }
        Assert.Equal(instants.Distinct().Order(), instants);
        Assert.Equal(DateTimeOffset.UnixEpoch.AddMilliseconds(4), instants[^1]);
    }

    // R4 http, "capabilities": GET /metadata answers the CapabilityStatement.
    [Fact]
    public async Task Metadata_states_what_it_can()
    {
        await using var c = await Start();
        var reply = await c.Get("metadata");
        Assert.Equal("4.0.1", reply.Json["fhirVersion"]!.GetValue<string>());
        FhirJsonDeserializer.STRICT.TryDeserializeResource(reply.Text, out _, out var problems);
        Assert.Empty(problems);
    }

    [Fact]
    public async Task The_journal_tells_what_happened()
    {
        await using var c = await Start();
        var id = await c.Created(Observation());
        await c.Get($"Observation/{id}");
        await c.Get("Observation?code=x");
        Assert.Equal([("POST", "Observation", id, 1, 201), ("GET", "Observation", id, 1, 200), ("GET", "Observation", null, null, 200)],
            c.Server.Journal.Entries.Select(e => (e.Method, e.Type!, e.Id, e.Version, e.Status)));
    }
}

internal sealed class StoppedClock(DateTimeOffset at) : TimeProvider
{
    private DateTimeOffset _now = at;

    public override DateTimeOffset GetUtcNow() => _now;

    public void Advance(TimeSpan by) => _now += by;
}
