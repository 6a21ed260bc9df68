using Microsoft.Extensions.Logging;
using Orleans;
using Orleans.Concurrency;
using RespDerive.Service.Operations;

namespace RespDerive.Service.Patients;

/// <summary>A patient's worker; its key is the store's number of the patient.</summary>
internal interface IPatientGrain : IGrainWithIntegerKey
{
    /// <summary>Something was journalled. Losing or doubling this is harmless: what is open is swept.</summary>
    [OneWay]
    Task Wake();
}

/// <summary>Takes a patient's turns, one at a time. A queue and nothing more: the turn number in the store is the lock.</summary>
internal sealed class PatientGrain(PatientTurn turn, TimeProvider time, ILogger<PatientGrain> logger) : Grain, IPatientGrain
{
    /// <summary>Messages of one moment come one by one; waiting this long lets one turn see them together.</summary>
    private static readonly TimeSpan Gather = TimeSpan.FromMilliseconds(400);

    private int _failures;
    private DateTimeOffset _notBefore;

    /// <inheritdoc/>
    public async Task Wake()
    {
        var patient = this.GetPrimaryKeyLong();
        try
        {
            if (time.GetUtcNow() >= _notBefore && turn.IsOpen(patient))
            {
                await Task.Delay(Gather, time);
                while (await turn.TakeAsync(patient))
                {
                }

                _failures = 0;
            }
        }
        catch (Exception exception)
        {
            // A patient whose turn keeps failing must not keep the others waiting.
            _notBefore = time.GetUtcNow() + BackOff.After(_failures++, TimeSpan.FromMinutes(5), $"{patient}");
            Trouble.Report(logger, exception, $"A turn of patient {patient} failed and will be swept up");
        }
    }
}
