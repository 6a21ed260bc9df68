using System.Net;

namespace RespDerive.Service.Tests;

/// <summary>Whatever the channel, the same result stands at the server in the end.</summary>
public sealed class IntakeTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Subscription_with_payload_gives_the_ratio_with_its_evidence()
    {
        await using var bench = await Bench.StartAsync();
        await AssertRatioAsync(bench, () => bench.Fhir.PutAsync);
    }

    [Fact]
    public async Task Subscription_without_payload_gives_the_same()
    {
        await using var bench = await Bench.StartAsync(("Intake:Payload", "false"));
        await AssertRatioAsync(bench, () => bench.Fhir.PutAsync);
    }

    [Fact]
    public async Task Polling_alone_gives_the_same()
    {
        await using var bench = await Bench.StartAsync(Bench.Polling);
        await AssertRatioAsync(bench, () => bench.Fhir.PutAsync);
    }

    [Fact]
    public async Task Posting_straight_to_the_endpoint_gives_the_same()
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        await AssertRatioAsync(bench, () => async resource =>
        {
            // As a server with rest-hook channel and payload does: an update below the endpoint.
            var stored = await bench.Fhir.PutAsync(resource);
            using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/{resource["resourceType"]}/{resource["id"]}", FhirClient.Content(stored));
            Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
            return stored;
        });
    }

    [Fact]
    public async Task Our_own_output_coming_back_is_dropped()
    {
        await using var bench = await Bench.StartAsync();
        await AssertRatioAsync(bench, () => bench.Fhir.PutAsync);
        await bench.IdleAsync();
        var before = bench.Store.Counts();
        Assert.Equal(3, before.Received);

        // Once more by hand, in case the subscription had not brought it.
        var result = await bench.ResultAsync("p", "pf-ratio", _ => true);
        using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/Observation/{result["id"]}", FhirClient.Content(result));
        Assert.Equal(HttpStatusCode.OK, answer.StatusCode);
        await bench.IdleAsync();
        Assert.Equal(before, bench.Store.Counts());
        Assert.Single(await bench.Fhir.ResultsAsync("p"));
    }

    private static async Task AssertRatioAsync(Bench bench, Func<Func<System.Text.Json.Nodes.JsonObject, Task<System.Text.Json.Nodes.JsonObject>>> channel)
    {
        var send = channel();
        await send(Some.Patient("p"));
        var oxygen = await send(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        var gas = await send(Some.Gas("gas", "p", 80, Drawn));
        var ratio = await bench.ResultAsync("p", "pf-ratio", _ => true);
        Assert.Equal(200, ratio.Value());
        Assert.Equal("mm[Hg]", ratio["valueQuantity"]!["code"]!.ToString());
        Assert.Equal("final", ratio.Status());
        Assert.Equal("Patient/p", ratio["subject"]!["reference"]!.ToString());
        Assert.Equal(gas["effectiveDateTime"]!.ToString(), ratio["effectiveDateTime"]!.ToString());
        Assert.True(Guid.TryParse(ratio.ResultId(), out _));
        Assert.Equal([$"Observation/fio2/_history/{oxygen.Version()}", $"Observation/gas/_history/{gas.Version()}"], ratio.DerivedFrom());
        var provenance = Assert.Single(await bench.Fhir.ProvenancesAsync(ratio));
        Assert.Equal("CREATE", provenance.Activity());
        Assert.Equal(ratio.DerivedFrom(), provenance.Entities("source"));
        Assert.Single(await bench.Fhir.ResultsAsync("p"));
    }
}
