using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>What people wrote at the server has the last word, also where the store that knew our own words is lost.</summary>
public sealed class PeopleTests
{
    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Persons_withdrawal_outlives_the_store(bool ownIds)
    {
        await using var between = await PublishedAsync(ownIds);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        var theirs = (await chart.CopiesAsync())[0];
        theirs["status"] = "entered-in-error";
        theirs = await bench.Fhir.PutAsync(theirs);
        await WithoutStoreAsync(bench, chart);

        var state = await chart.StateAsync(state => state.WithdrawnByPerson);
        Assert.Null(state.Attempt);
        await bench.IdleAsync();
        AssertUntouched(theirs, Assert.Single(await chart.CopiesAsync()));
        Assert.Single(await bench.Fhir.ProvenancesAsync(theirs));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Persons_change_outlives_the_store(bool ownIds)
    {
        await using var between = await PublishedAsync(ownIds);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        var theirs = (await chart.CopiesAsync())[0];
        theirs["note"] = new JsonArray(new JsonObject { ["text"] = "checked at the bedside" });
        theirs = await bench.Fhir.PutAsync(theirs);
        await WithoutStoreAsync(bench, chart);

        await chart.StateAsync(state => state.Parked == "foreign-edit");
        AssertUntouched(theirs, Assert.Single(await chart.CopiesAsync()));
        Assert.Single(await bench.Fhir.ProvenancesAsync(theirs));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Own_edition_is_taken_up_after_the_store_was_lost(bool ownIds)
    {
        await using var between = await PublishedAsync(ownIds);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        await WithoutStoreAsync(bench, chart);
        await chart.AssertAsync(200, "CREATE", "UPDATE");
    }

    [Fact]
    public async Task What_we_wrote_before_and_a_person_restored_is_theirs()
    {
        await using var between = await PublishedAsync(ownIds: false);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        var first = (await chart.CopiesAsync())[0];
        await chart.GasAsync(88);
        await chart.AssertAsync(220, "CREATE", "UPDATE");
        var theirs = await bench.Fhir.PutAsync(first);

        await chart.GasAsync(96);
        await chart.StateAsync(state => state.Parked == "foreign-edit");
        AssertUntouched(theirs, Assert.Single(await chart.CopiesAsync()));
    }

    [Fact]
    public async Task Second_copy_is_retracted_with_its_own_Provenance()
    {
        await using var between = await PublishedAsync(ownIds: false);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        bench.Sandbox.Faults.RaceNextConditionalCreates(20);
        await WithoutStoreAsync(bench, chart);
        await chart.StateAsync(state => state is { IsPending: false, ServerId: not null });
        await bench.IdleAsync();

        var copies = await chart.CopiesAsync();
        Assert.Equal(2, copies.Length);
        Assert.Equal(200, Assert.Single(copies, one => one.Status() != "entered-in-error").Value());
        var retracted = Assert.Single(copies, one => one.Status() == "entered-in-error");
        Assert.Null(retracted["valueQuantity"]);
        Assert.Null(retracted["component"]);
        Assert.Equal("error", retracted["dataAbsentReason"]!["coding"]![0]!["code"]!.ToString());
        Assert.Contains("second copy", retracted["note"]![0]!["text"]!.ToString(), StringComparison.Ordinal);
        Assert.Equal(["CREATE", "NULLIFY"], (await bench.Fhir.ProvenancesAsync(retracted)).OrderBy(Chart.Revision).Select(one => one.Activity()));
    }

    [Fact]
    public async Task Second_copy_that_a_person_changed_is_left_to_people()
    {
        await using var between = await PublishedAsync(ownIds: false);
        var (bench, chart) = (between.Bench, new Chart(between.Bench));
        var copy = (await chart.CopiesAsync())[0];
        copy["id"] = "zz-copy";
        copy["note"] = new JsonArray(new JsonObject { ["text"] = "entered at the bedside" });
        var theirs = await bench.Fhir.PutAsync(copy);
        await WithoutStoreAsync(bench, chart);

        await chart.StateAsync(state => state.Parked == "foreign-edit");
        AssertUntouched(theirs, (await chart.CopiesAsync())[^1]);
        Assert.Empty(await bench.Fhir.ProvenancesAsync(theirs));
    }

    private static async Task<Between> PublishedAsync(bool ownIds)
    {
        var between = await Between.StartAsync(("Delivery:OwnIds", ownIds ? "true" : "false"));
        var chart = new Chart(between.Bench);
        await chart.OpenAsync();
        await chart.GasAsync(80);
        await chart.AssertAsync(200, "CREATE");
        return between;
    }

    private static async Task WithoutStoreAsync(Bench bench, Chart chart)
    {
        await bench.StopServiceAsync();
        bench.ForgetStore();
        await bench.StartServiceAsync();
        await chart.OpenAsync();
        await chart.GasAsync(80);
        await chart.IdentityAsync();
    }

    private static void AssertUntouched(JsonObject theirs, JsonObject now)
    {
        Assert.Equal(theirs["id"]!.ToString(), now["id"]!.ToString());
        Assert.Equal(theirs.Version(), now.Version());
    }
}
