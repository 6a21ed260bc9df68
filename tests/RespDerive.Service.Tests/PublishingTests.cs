namespace RespDerive.Service.Tests;

/// <summary>What may leave the service, and what people at the server have the last word on.</summary>
public sealed class PublishingTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Without_delivery_everything_is_kept_and_nothing_leaves()
    {
        await using var bench = await Bench.StartAsync(("Delivery:On", "false"));
        await RatioInputsAsync(bench);
        await Until.True(() => bench.Store.Counts().Results == 1, "a result in the store");
        await bench.Sandbox.Notifications.QuietAsync(TestContext.Current.CancellationToken);
        Assert.Empty(await bench.Fhir.ResultsAsync("p"));
        foreach (var type in new[] { "Provenance", "Device", "Library" })
        {
            Assert.Empty(await bench.Fhir.SearchAsync(type));
        }
    }

    [Fact]
    public async Task What_happened_before_the_first_start_is_context_only()
    {
        await using var bench = await Bench.StartAsync(("Delivery:PublishHistory", "false"));
        await RatioInputsAsync(bench);
        await bench.Fhir.PutAsync(Some.Gas("new", "p", 60, TimeProvider.System.GetUtcNow()));
        var only = await bench.ResultAsync("p", "pf-ratio", _ => true);
        Assert.Equal(150, only.Value());
        await bench.IdleAsync();
        Assert.Single(await bench.Fhir.ResultsAsync("p"));
        Assert.Equal(2, bench.Store.Counts().Results);
    }

    [Fact]
    public async Task What_a_person_changed_is_never_overwritten()
    {
        await using var bench = await Bench.StartAsync();
        await RatioInputsAsync(bench);
        var ours = await bench.ResultAsync("p", "pf-ratio", _ => true);
        ours["note"] = new System.Text.Json.Nodes.JsonArray(new System.Text.Json.Nodes.JsonObject { ["text"] = "checked at the bedside" });
        var theirs = await bench.Fhir.PutAsync(ours);

        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 100, Drawn, status: "corrected"));
        var identity = Guid.Parse(ours.ResultId()!);
        await Until.True(() => bench.Store.FindDelivery(identity)?.Parked == "foreign-edit", "parked");
        var now = await bench.Fhir.ReadAsync($"Observation/{ours["id"]}");
        Assert.Equal(theirs.Version(), now.Version());
        Assert.Equal(200, now.Value());
        Assert.Equal(1, bench.Store.Counts().Refused);
        Assert.Single(await bench.Fhir.ProvenancesAsync(ours));
    }

    [Fact]
    public async Task A_persons_withdrawal_is_final()
    {
        await using var bench = await Bench.StartAsync();
        await RatioInputsAsync(bench);
        var ours = await bench.ResultAsync("p", "pf-ratio", _ => true);
        ours["status"] = "entered-in-error";
        var theirs = await bench.Fhir.PutAsync(ours);
        var identity = Guid.Parse(ours.ResultId()!);

        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 100, Drawn, status: "corrected"));
        await Until.True(() => bench.Store.Counts() is { Results: 0, Pending: 0 }, "the withdrawal seen");
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 110, Drawn, status: "corrected"));
        await Until.True(() => bench.Store.Counts() is { Received: 5 }, "the next correction taken");
        await bench.IdleAsync();
        Assert.Equal(theirs.Version(), (await bench.Fhir.ReadAsync($"Observation/{ours["id"]}")).Version());
        Assert.True(bench.Store.FindDelivery(identity)!.WithdrawnByPerson);
        Assert.Single(await bench.Fhir.ProvenancesAsync(ours));
        Assert.Equal(0, bench.Store.Counts().Refused);
    }

    private static async Task RatioInputsAsync(Bench bench)
    {
        await bench.Fhir.PutAsync(Some.Patient("p"));
        await bench.Fhir.PutAsync(Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)));
        await bench.Fhir.PutAsync(Some.Gas("gas", "p", 80, Drawn));
    }
}
