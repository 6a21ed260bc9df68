using RespDerive.Service;
using RespDerive.Service.Tests;

namespace RespDerive.Acceptance.Tests;

/// <summary>
/// The whole life of a result at a server of others: published, revised, retracted. That server keeps numbers without trailing zeros,
/// has UUIDs as versions, and answers 200 to the first update of an id.
/// </summary>
public sealed class PeerTests(Peer peer)
{
    [Theory]
    [InlineData("polling")]
    [InlineData("subscription")]
    [InlineData("subscription without payload")]
    public async Task Result_is_published_revised_and_retracted(string intake)
    {
        using var server = await peer.StartAsync();
        using var folder = new Folder();
        using var fhir = new FhirClient(server.BaseUrl);
        var address = $"http://127.0.0.1:{Ports.Free()}";
        var polling = intake == "polling";
        await using var service = await Executable.ServeAsync(address,
            ("Store", folder["peer.db"]), ("Source:Address", server.BaseUrl), ("Delivery:On", "true"), ("Delivery:PublishHistory", "true"), ("Delivery:LongestBackOff", "00:00:02"),
            ("Intake:PollEvery", polling ? "00:00:01" : "01:00:00"), ("Intake:Subscribe", polling ? "false" : "true"), ("Intake:Endpoint", address + "/notify"),
            ("Intake:Payload", intake == "subscription" ? "true" : "false"), ("Intake:NotificationAuthorization", "Bearer agreed"));
        if (!polling)
        {
            await Until.True(async () => (await fhir.SearchAsync("Subscription")).Count == IntakeOptions.DefaultCriteria.Count, "the subscriptions");
        }

        var drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);
        await fhir.PutAsync(Some.Patient("p"));
        var oxygen = await fhir.PutAsync(Some.FiO2("fio2", "p", 40, drawn.AddMinutes(-60)));
        var gas = await fhir.PutAsync(Some.Gas("gas", "p", 80, drawn));
        var first = await fhir.ResultAsync("p", "pf-ratio", one => one.Value() == 200, () => service.Error);
        Assert.Equal("final", first.Status());
        Assert.Equal(Sorted($"Observation/fio2/_history/{oxygen.Version()}", $"Observation/gas/_history/{gas.Version()}"), first.DerivedFrom());
        var created = Assert.Single(await fhir.ProvenancesAsync(first));
        Assert.Equal("CREATE", created.Activity());
        Assert.Equal(first.DerivedFrom(), created.Entities("source"));
        Assert.StartsWith("Device/", created["agent"]![0]!["who"]!["reference"]!.ToString(), StringComparison.Ordinal);

        var corrected = await fhir.PutAsync(Some.Gas("gas", "p", 82.5, drawn, status: "corrected"));
        var second = await fhir.ResultAsync("p", "pf-ratio", one => one.Version() != first.Version(), () => service.Error);
        Assert.Equal(("corrected", 206m), (second.Status(), second.Value()));
        Assert.Equal(first["id"]!.ToString(), second["id"]!.ToString());
        Assert.Contains($"Observation/gas/_history/{corrected.Version()}", second.DerivedFrom());
        var updated = Assert.Single(await fhir.ProvenancesAsync(second), one => one.Activity() == "UPDATE");
        Assert.Equal([$"Observation/{first["id"]}/_history/{first.Version()}"], updated.Entities("revision"));

        await fhir.PutAsync(Some.Gas("gas", "p", 82.5, drawn, status: "entered-in-error"));
        var third = await fhir.ResultAsync("p", "pf-ratio", one => one.Status() == "entered-in-error", () => service.Error);
        Assert.Null(third["valueQuantity"]);
        Assert.NotNull(third["dataAbsentReason"]);
        Assert.Equal(["CREATE", "NULLIFY", "UPDATE"], (await fhir.ProvenancesAsync(third)).Select(one => one.Activity()).Order());
        Assert.Single(await fhir.ResultsAsync("p"));
    }

    private static string[] Sorted(params string[] references) => [.. references.Order(StringComparer.Ordinal)];
}
