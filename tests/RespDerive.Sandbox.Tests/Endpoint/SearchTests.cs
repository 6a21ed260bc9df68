using static RespDerive.Sandbox.Tests.Endpoint.Client;

namespace RespDerive.Sandbox.Tests.Endpoint;

/// <summary>Rules quoted from FHIR R4 "Search" (hl7.org/fhir/R4/search.html).</summary>
public sealed class SearchTests
{
    // R4 search, "token": [code], [system]|[code], |[code], [system]|; commas are OR, repeated parameters AND.
    [Theory]
    [InlineData("code=2703-7", 2)]
    [InlineData("code=http://loinc.org|2703-7", 2)]
    [InlineData("code=http://loinc.org|", 3)]
    [InlineData("code=|2703-7", 0)]
    [InlineData("code=urn:other|2703-7", 0)]
    [InlineData("code=2703-7,2019-8", 3)]
    [InlineData("code=2703-7&code=2019-8", 0)]
    [InlineData("status=final", 2)]
    [InlineData("status=final,corrected", 3)]
    [InlineData("status:not=final", 1)]
    [InlineData("specimen:missing=false", 1)]
    // "reference": id, type/id, absolute URL; the parameter 'patient' only takes patients.
    [InlineData("subject=Patient/p1", 2)]
    [InlineData("patient=p1", 2)]
    [InlineData("patient=Patient/p1", 2)]
    [InlineData("patient=Patient/p1,Patient/p2", 3)]
    [InlineData("subject:Patient=p2", 1)]
    [InlineData("specimen=Specimen/s1", 1)]
    [InlineData("device=Device/d1", 1)]
    [InlineData("encounter=Encounter/e1", 1)]
    [InlineData("derived-from=Observation/o9", 1)]
    [InlineData("derived-from=Observation/o9/_history/3", 1)]
    [InlineData("derived-from=Observation/o9/_history/4", 0)]
    [InlineData("category=laboratory", 1)]
    [InlineData("identifier=urn:example:own|a", 1)]
    // "Prefixes" on dates: both sides are ranges of their own precision.
    [InlineData("date=2026-01-02", 2)]
    [InlineData("date=ge2026-01-02T10:00:00Z", 3)]
    [InlineData("date=gt2026-01-02T10:00:00Z", 2)]
    [InlineData("date=gt2026-01-02", 1)]
    [InlineData("date=lt2026-01-02T11:00:00Z", 1)]
    [InlineData("date=le2026-01-02T12:00:00%2B01:00", 2)]
    [InlineData("date=ge2026-01-02T10:30:00Z&date=lt2026-01-03", 1)]
    [InlineData("date=sa2026-01-02", 1)]
    [InlineData("date=eb2026-01-03", 2)]
    [InlineData("date=ne2026-01-02", 1)]
    public async Task Search_finds(string query, int count)
    {
        await using var c = await Planted();
        var reply = await c.Get($"Observation?{query}");
        Assert.True(reply.Status == 200, reply.Text);
        Assert.Equal(count, reply.Total);
        Assert.Equal(count, reply.Entries.Count());
    }

    // R4 search, "Introduction": POST [type]/_search with the same parameters in a form.
    [Fact]
    public async Task Search_by_post_is_the_same()
    {
        await using var c = await Planted();
        var reply = await c.Send("POST", "Observation/_search", "code=http%3A%2F%2Floinc.org%7C2703-7&status=final", "application/x-www-form-urlencoded");
        Assert.Equal(1, reply.Total);
    }

    // R4 search, "Server Conformance" / "self link": unknown parameters are ignored and not in the self link.
    [Fact]
    public async Task Unknown_parameters_are_ignored_and_left_out_of_the_self_link()
    {
        await using var c = await Planted();
        var reply = await c.Get("Observation?code=2703-7&unheard-of=1&_sort=value");
        Assert.Equal(2, reply.Total);
        Assert.Equal($"{c.Server.BaseUrl}/Observation?code=2703-7", reply.Link("self"));
        (await c.Get("Observation?unheard-of=1", ("Prefer", "handling=strict"))).IsOutcome(400);
        (await c.Get("Observation?code:below=1")).IsOutcome(400);
        (await c.Get("Observation?date=yesterday")).IsOutcome(400);
        (await c.Get("Observation?date=gt2026-01-02T10:00:00+01:00")).IsOutcome(400);
    }

    // R4 http, "Paging": follow server links; every match exactly once, also when something changes in between.
    [Fact]
    public async Task Pages_follow_each_other_without_gaps_or_repeats()
    {
        await using var c = await Start();
        var ids = new List<string>();
        for (var i = 0; i < 7; i++)
        {
            ids.Add(await c.Created(Observation(value: $"{60 + i}")));
        }
        var first = await c.Get("Observation?_count=3&_sort=_lastUpdated");
        Assert.Equal(7, first.Total);
        Assert.Equal(3, first.Entries.Count());
        await c.Put($"Observation/{ids[0]}", Observation(value: "99", more: $",\"id\":\"{ids[0]}\""));
        var rest = await c.Found(first.Link("next")!);
        Assert.Equal(ids, first.Entries.Select(e => e["resource"]!["id"]!.GetValue<string>()).Concat(rest));
        (await c.Get("Observation?result=unknown&from=3")).IsOutcome(410);
        Assert.Empty((await c.Get("Observation?_count=0")).Entries);
    }

    // R4 search, "_sort" and "_lastUpdated".
    [Fact]
    public async Task Sorts_and_filters_by_last_updated()
    {
        await using var c = await Start();
        var a = await c.Post("Observation", Observation(at: "2026-01-05"));
        var b = await c.Post("Observation", Observation(at: "2026-01-04"));
        var d = await c.Post("Observation", Observation(at: "2026-01-06"));
        string[] ids = [.. new[] { a, b, d }.Select(r => r.Json["id"]!.GetValue<string>())];
        Assert.Equal(ids.Reverse(), await c.Found("Observation?_sort=-_lastUpdated&_count=2"));
        Assert.Equal([ids[1], ids[0], ids[2]], await c.Found("Observation?_sort=date"));
        var second = b.Json["meta"]!["lastUpdated"]!.GetValue<string>();
        Assert.Equal([ids[1], ids[2]], await c.Found($"Observation?_lastUpdated=ge{second}"));
        Assert.Equal([ids[2]], await c.Found($"Observation?_lastUpdated=gt{second}"));
        Assert.Equal([ids[0]], await c.Found($"Observation?_lastUpdated=lt{second}"));
        Assert.Equal([ids[0], ids[1]], await c.Found($"Observation?_lastUpdated=le{second}"));
        Assert.Equal([ids[1]], await c.Found($"Observation?_lastUpdated=ge{second}&_lastUpdated=le{second}"));
        Assert.Equal([ids[0], ids[2]], await c.Found($"Observation?_id={ids[0]},{ids[2]}"));
    }

    [Fact]
    public async Task Provenance_is_found_by_target_and_entity()
    {
        await using var c = await Start();
        await c.Created("""
            {"resourceType":"Provenance","target":[{"reference":"Observation/t1/_history/2"}],"recorded":"2026-01-02T10:00:00Z",
            "agent":[{"who":{"reference":"Device/d1"}}],"entity":[{"role":"source","what":{"reference":"Observation/s1/_history/1"}}]}
            """);
        Assert.Single(await c.Found("Provenance?target=Observation/t1"));
        Assert.Single(await c.Found("Provenance?target=Observation/t1/_history/2"));
        Assert.Single(await c.Found("Provenance?entity=Observation/s1"));
        Assert.Empty(await c.Found("Provenance?target=Observation/s1"));
    }

    private static async Task<Client> Planted()
    {
        var c = await Start();
        await c.Created(Observation(at: "2026-01-02T10:00:00Z", more: """
            ,"specimen":{"reference":"Specimen/s1"},"device":{"reference":"Device/d1"},"encounter":{"reference":"Encounter/e1"},
            "category":[{"coding":[{"system":"urn:c","code":"laboratory"}]}],"identifier":[{"system":"urn:example:own","value":"a"}]
            """));
        await c.Created(Observation(at: "2026-01-02T12:00:00+01:00", status: "corrected", more: ",\"derivedFrom\":[{\"reference\":\"Observation/o9/_history/3\"}]"));
        await c.Created(Observation(code: "2019-8", at: "2026-01-03T09:00:00Z", patient: "Patient/p2"));
        return c;
    }
}
