using System.Collections.Concurrent;
using System.Text.Json.Nodes;
using RespDerive.Sandbox;
using RespDerive.Service;
using RespDerive.Service.Tests;

namespace RespDerive.Acceptance.Tests;

/// <summary>Killed without a word in the middle of its work, the service loses nothing that it acknowledged and doubles nothing.</summary>
public sealed class KillTests
{
    private const int Patients = 12, Gases = 6;

    [Fact]
    public async Task Every_acknowledged_notification_has_its_effect_and_none_has_it_twice()
    {
        using var folder = new Folder();
        await using var sandbox = await SandboxServer.StartAsync(new SandboxOptions(), TestContext.Current.CancellationToken);
        using var fhir = new FhirClient(sandbox.BaseUrl);
        var address = $"http://127.0.0.1:{Ports.Free()}";
        var acknowledged = new ConcurrentDictionary<string, bool>();

        var service = await StartAsync();
        try
        {
            var load = SendAsync(address, acknowledged);
            foreach (var reached in new[] { 12, 45 })
            {
                await Until.True(() => acknowledged.Count >= reached, $"{reached} acknowledged");
                await service.KillAsync();
                await service.DisposeAsync();
                service = await StartAsync();
            }

            await load;
            await Until.True(async () => (await fhir.SearchAsync("Observation?_count=1000")).Count(one => one.ResultId() is not null) == Patients * Gases, "a result for each gas");
            foreach (var patient in Enumerable.Range(0, Patients).Select(number => $"p{number}"))
            {
                var results = await fhir.ResultsAsync(patient);
                Assert.Equal([150, 160, 170, 180, 190, 200], results.Select(one => (int)one.Value()!.Value).Order());
                Assert.Equal(Gases, results.Select(one => one.ResultId()).Distinct().Count());
                foreach (var result in results)
                {
                    Assert.Equal("1", result.Version());
                    Assert.Single(await fhir.ProvenancesAsync(result));
                }
            }
        }
        finally
        {
            await service.DisposeAsync();
        }

        Task<Executable> StartAsync() => Executable.ServeAsync(address,
            ("Store", folder["kill.db"]), ("Source:Address", sandbox.BaseUrl), ("Intake:PollEvery", "01:00:00"),
            ("Delivery:On", "true"), ("Delivery:PublishHistory", "true"), ("Delivery:LongestBackOff", "00:00:02"));
    }

    /// <summary>Sends each resource until it is acknowledged, and then never again. The server that is read does not have them.</summary>
    private static Task SendAsync(string address, ConcurrentDictionary<string, bool> acknowledged)
    {
        var start = TimeProvider.System.GetUtcNow().AddHours(-3);
        var resources = Enumerable.Range(0, Gases).SelectMany(gas => Enumerable.Range(0, Patients).SelectMany(number =>
        {
            var id = $"p{number}";
            JsonObject[] first = gas == 0 ? [Some.Patient(id), Some.FiO2($"{id}-fio2", id, 40, start)] : [];
            return first.Append(Some.Gas($"{id}-gas{gas}", id, 60 + (4 * gas), start.AddMinutes(30 + (10 * gas))));
        }));
        var http = new HttpClient();
        return Parallel.ForEachAsync(resources, new ParallelOptions { MaxDegreeOfParallelism = 2, CancellationToken = TestContext.Current.CancellationToken }, async (resource, cancel) =>
        {
            var reference = $"{resource["resourceType"]}/{resource["id"]}";
            await Until.True(
                async () =>
                {
                    try
                    {
                        using var content = FhirClient.Content(resource);
                        using var answer = await http.PutAsync($"{address}/notify/{reference}", content, cancel);
                        return answer.IsSuccessStatusCode;
                    }
                    catch (HttpRequestException)
                    {
                        return false;
                    }
                },
                $"acknowledgement of {reference}");
            acknowledged[reference] = true;
        });
    }
}
