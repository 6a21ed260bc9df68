using System.Text;
using System.Text.Json.Nodes;

namespace RespDerive.Service.Tests;

/// <summary>Nothing about a patient, and no query, is ever logged.</summary>
public sealed class LogTests
{
    private static readonly DateTimeOffset Drawn = TimeProvider.System.GetUtcNow().AddMinutes(-30);

    [Fact]
    public async Task Neither_good_days_nor_bad_ones_put_patients_into_the_logs()
    {
        const string Patient = "kanary-patient-7731", Gas = "kanary-gas-7732", Fio2 = "kanary-fio2-7733", Specimen = "kanary-blood-7734";
        using var server = new OddServer();
        server.Next(_ => OddServer.Text(502, $"<html>{Some.Mark}</html>"));
        server.Next(_ => OddServer.Json(422, new JsonObject
        {
            ["resourceType"] = "OperationOutcome",
            ["issue"] = new JsonArray(new JsonObject { ["severity"] = "error", ["code"] = "invalid", ["diagnostics"] = $"{Some.Mark} at Patient/{Patient}?name={Some.Mark}" }),
        }));
        await using (var bench = await Bench.StartAsync(("Delivery:Address", server.BaseUrl), ("Intake:PollEvery", "00:00:00.3")))
        {
            await bench.Fhir.PutAsync(Some.Patient(Patient));
            await bench.Fhir.PutAsync(Some.FiO2(Fio2, Patient, 40, Drawn.AddMinutes(-60)));
            await bench.Fhir.PutAsync(Some.Gas(Gas, Patient, 80, Drawn, specimen: Specimen));
            bench.Sandbox.Faults.FailNext(6, 500, "GET");
            foreach (var body in new[] { $"{{\"resourceType\":\"Patient\",\"name\":\"{Some.Mark}\"", $"{Some.Mark}", $"{{\"resourceType\":\"Observation\",\"id\":\"{Gas}\",\"valueString\":{{\"x\":\"{Some.Mark}\"}}}}" })
            {
                using var answer = await bench.NotifyAsync(HttpMethod.Put, $"/Observation/{Gas}?name={Some.Mark}", new StringContent(body, Encoding.UTF8, "application/fhir+json"));
                Assert.DoesNotContain(Some.Mark, await answer.Content.ReadAsStringAsync(TestContext.Current.CancellationToken), StringComparison.Ordinal);
            }

            bench.Sandbox.Faults.Clear();
            await bench.Fhir.PutAsync(Some.Specimen(Specimen, Patient, Drawn));
            await Until.True(() => bench.Store.Counts().Refused == 1, "parked", bench.Thoughts);
            bench.Sandbox.Faults.FailNext(50, 500);
            await Until.True(() => CapturedLogs.Text.Contains("Poller failed", StringComparison.Ordinal), "a failing poll", bench.Thoughts);
            bench.Sandbox.Faults.Clear();
        }

        var text = CapturedLogs.Text;
        Assert.Contains("is parked", text, StringComparison.Ordinal);
        foreach (var never in new[] { Some.Mark, Patient, Gas, Fio2, Specimen, "kanary", "_lastUpdated", "_sort", "name=", "Patient/", "1971-02-03" })
        {
            Assert.DoesNotContain(never, text, StringComparison.Ordinal);
        }
    }
}
