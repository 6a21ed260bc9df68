namespace RespDerive.Service.Tests;

/// <summary>Stopping the service in the middle of its work loses and doubles nothing.</summary>
public sealed class RestartTests
{
    [Fact]
    public async Task Stopped_in_the_middle_and_started_again_nothing_is_lost_or_doubled()
    {
        const int Patients = 8, Gases = 5;
        await using var bench = await Bench.StartAsync();
        var start = TimeProvider.System.GetUtcNow().AddHours(-3);
        for (var gas = 0; gas < Gases; gas++)
        {
            for (var patient = 0; patient < Patients; patient++)
            {
                var id = $"p{patient}";
                if (gas == 0)
                {
                    await bench.Fhir.PutAsync(Some.Patient(id));
                    await bench.Fhir.PutAsync(Some.FiO2($"{id}-fio2", id, 40, start));
                }

                await bench.Fhir.PutAsync(Some.Gas($"{id}-gas{gas}", id, 60 + (4 * gas), start.AddMinutes(30 + (10 * gas))));
            }

            // Down for the third round, whose notifications are lost with it.
            if (gas == 1)
            {
                await Until.True(() => bench.Store.Counts().Delivered > 0, "the first delivery");
                await bench.StopServiceAsync();
            }
            else if (gas == 2)
            {
                await bench.StartServiceAsync();
            }
        }

        await Until.True(() => bench.Store.Counts() is { Results: Patients * Gases, Pending: 0 }, "everything delivered");
        await bench.IdleAsync();
        for (var patient = 0; patient < Patients; patient++)
        {
            var results = await bench.Fhir.ResultsAsync($"p{patient}");
            Assert.Equal([150, 160, 170, 180, 190], results.Select(one => (int)one.Value()!.Value).Order());
            foreach (var result in results)
            {
                Assert.Single(await bench.Fhir.ProvenancesAsync(result));
            }
        }
    }
}
