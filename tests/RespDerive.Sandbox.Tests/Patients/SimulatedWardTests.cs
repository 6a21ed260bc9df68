using System.Globalization;
using RespDerive.Sandbox.Patients;
using RespDerive.Sandbox.Tests.Endpoint;

namespace RespDerive.Sandbox.Tests.Patients;

public sealed class SimulatedWardTests
{
    [Fact]
    public async Task The_ward_fills_the_endpoint_and_never_dates_anything_in_the_future()
    {
        await using var c = await Client.Start();
        var told = new List<string>();
        var scenario = await SimulatedWard.RunAsync(c.Server.BaseUrl, new WardOptions
        {
            Seed = 3,
            BackHistory = TimeSpan.FromMinutes(50),
            Live = TimeSpan.FromMinutes(10),
            TimeScale = 3000,
            Filed = e => told.Add(e.Id),
        }, Client.Cancel);
        Assert.Equal(scenario.Events.Select(e => e.Id), told);
        Assert.Equal(3, (await c.Found("Patient")).Count);
        Assert.Equal(scenario.Events.Where(e => e.Type == "Observation").Select(e => e.Id).Distinct().Count(), (await c.Found("Observation?_count=500")).Count);
        var page = await c.Get("Observation?_count=1000&_sort=-_lastUpdated");
        Assert.All(page.Entries, e =>
        {
            static DateTimeOffset Time(System.Text.Json.Nodes.JsonNode? node) => DateTimeOffset.Parse(node!.GetValue<string>(), CultureInfo.InvariantCulture);
            Assert.True(Time(e["resource"]!["effectiveDateTime"]) <= Time(e["resource"]!["meta"]!["lastUpdated"]));
        });
    }

    [Fact]
    public async Task A_failing_endpoint_is_tried_again()
    {
        await using var c = await Client.Start();
        c.Server.Faults.FailNext(2);
        await SimulatedWard.RunAsync(c.Server.BaseUrl, new WardOptions { BackHistory = TimeSpan.FromMinutes(1), Live = TimeSpan.Zero, Beds = 1 }, Client.Cancel);
        Assert.Single(await c.Found("Patient"));
    }
}
