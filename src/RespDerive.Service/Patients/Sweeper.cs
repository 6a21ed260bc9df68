using Microsoft.Extensions.Logging;
using Orleans;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Service.Patients;

/// <summary>Wakes patients whose wake was lost: at start, after a crash, after a failed turn.</summary>
internal sealed class Sweeper(Store store, IGrainFactory grains, TimeProvider time, ILogger<Sweeper> logger) : Loop(time, logger)
{
    private static readonly TimeSpan Every = TimeSpan.FromSeconds(2);
    private readonly TimeProvider _time = time;

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        if (store.OldestOpen() is { } oldest && _time.GetUtcNow() - oldest > Every)
        {
            foreach (var patient in store.PatientsWithOpenRows(500))
            {
                await grains.GetGrain<IPatientGrain>(patient).Wake();
            }
        }

        return Every;
    }
}
