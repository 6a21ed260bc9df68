using System.Text;
using System.Text.Json.Nodes;
using Microsoft.Data.Sqlite;

namespace RespDerive.Service.Tests;

/// <summary>What stands while something is missing, and what is said about it.</summary>
public sealed class StandingTests : IDisposable
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);
    private readonly OddServer _server = new();

    public void Dispose() => _server.Dispose();

    [Fact]
    public async Task Value_stands_while_a_corrected_gas_waits_for_its_specimen()
    {
        var status = 503;
        _server.On("GET", "/fhir/Specimen/blood", _ => Volatile.Read(ref status) == 200
            ? OddServer.Json(200, Some.Specimen("blood", "p", Drawn.AddMinutes(-1))) : OddServer.Text(Volatile.Read(ref status), ""));
        await using var alone = await WithRatioAsync();
        await alone.TellAsync(Changed(Some.Gas("gas", "p", 100, Drawn, specimen: "blood", status: "corrected")), Changed(Some.Gas("new", "p", 60, Drawn.AddMinutes(-5), specimen: "blood")));
        await Until.True(() => alone.Store.CountFetches() > 0 && alone.Store.OldestOpen() is null, "the gases waiting");
        Assert.Equal(200, alone.Ratio());
        Assert.Equal(0, alone.Store.Counts().Retractions);

        Volatile.Write(ref status, 200);
        await Until.True(() => alone.Store.Counts().Results == 2, "both values");
        Assert.Equal([150d, 250d], alone.Store.Outcomes(new Storage.OutcomeFilter { Definition = "pf-ratio" }).Select(one => one.Current!.Value!.Value).Order());
        Assert.Equal((1, 0), (alone.Store.Counts().Revisions, alone.Store.Counts().Retractions));
    }

    [Fact]
    public async Task Observation_that_names_no_patient_is_counted_and_still_replaces_what_it_was()
    {
        using var counted = new Counted("respderive.intake.refused", "no-patient");
        await using var alone = await WithRatioAsync();
        Assert.Equal(0, counted.Sum);
        var gas = Changed(Some.Gas("gas", "p", 80, Drawn));
        gas.Remove("subject");
        await alone.TellAsync(gas, gas);
        await Until.True(() => alone.Ratio() is null, "the value gone");
        Assert.Equal(1, counted.Sum);
    }

    [Fact]
    public async Task Failed_turn_is_logged_without_the_patient()
    {
        await using var alone = await WithRatioAsync();
        var number = alone.Store.PatientNumber("ehr", "Patient/p");
        await using (var connection = new SqliteConnection($"Data Source={alone.StorePath};Pooling=False"))
        {
            await connection.OpenAsync(TestContext.Current.CancellationToken);
            await using var damage = connection.CreateCommand();
            damage.CommandText = "UPDATE reading SET body = x'00'";
            Assert.True(await damage.ExecuteNonQueryAsync(TestContext.Current.CancellationToken) > 0);
        }

        await alone.TellAsync(Changed(Some.Gas("gas", "p", 100, Drawn)));
        await Until.True(() => CapturedLogs.Text.Contains("A turn of a patient failed", StringComparison.Ordinal), "the failure");
        Assert.DoesNotContain($"patient {number}", CapturedLogs.Text, StringComparison.OrdinalIgnoreCase);
    }

    [Theory]
    [InlineData("[]")]
    [InlineData("xx")]
    [InlineData("17")]
    [InlineData("\"\"")]
    public async Task Two_bytes_are_no_empty_notification(string body)
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        using var answer = await bench.NotifyAsync(HttpMethod.Post, "", new StringContent(body, Encoding.UTF8, "application/fhir+json"));
        Assert.Equal(System.Net.HttpStatusCode.BadRequest, answer.StatusCode);
    }

    [Theory]
    [InlineData("")]
    [InlineData("{}")]
    [InlineData(" {\r\n}\n")]
    public async Task Nothing_or_an_empty_object_says_that_something_changed(string body)
    {
        await using var bench = await Bench.StartAsync(Bench.Silent);
        await Until.True(() => bench.Store.Cursor("search:Procedure?") is not null, "the first poll");
        await bench.Fhir.PutAsync(Some.Patient("p"));
        using var answer = await bench.NotifyAsync(HttpMethod.Post, "", new StringContent(body, Encoding.UTF8, "application/fhir+json"));
        Assert.Equal(System.Net.HttpStatusCode.OK, answer.StatusCode);
        await Until.True(() => bench.Store.Counts().Received == 1, "what changed");
    }

    private async Task<Alone> WithRatioAsync()
    {
        var alone = await Alone.StartAsync(_server);
        await alone.TellAsync(Some.Patient("p"), Some.FiO2("fio2", "p", 40, Drawn.AddMinutes(-60)), Some.Gas("gas", "p", 80, Drawn));
        await Until.True(() => alone.Ratio() == 200, "the value");
        return alone;
    }

    private static JsonObject Changed(JsonObject resource)
    {
        resource["meta"] = new JsonObject { ["lastUpdated"] = Some.Time(TimeProvider.System.GetUtcNow()) };
        return resource;
    }
}
