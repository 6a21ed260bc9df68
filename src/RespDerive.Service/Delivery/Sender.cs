using System.Diagnostics.Metrics;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Service.Delivery;

/// <summary>Brings the server to the wanted state of every result: in order per patient, several patients at once.</summary>
internal sealed class Sender(Store store, Target target, Postman postman, IOptions<ServiceOptions> options, TimeProvider time, Feed feed, ILogger<Sender> logger) : Loop(time, logger)
{
    private static readonly TimeSpan Idle = TimeSpan.FromMilliseconds(250);
    private static readonly TimeSpan Off = TimeSpan.FromMinutes(1);
    private static readonly Counter<long> Sent = Telemetry.Meter.CreateCounter<long>("respderive.delivery.editions", "{edition}", "Editions by what became of them");
    private readonly TimeProvider _time = time;

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        if (!options.Value.Delivery.On)
        {
            return Off;
        }

        var due = store.DueDeliveries(_time.GetUtcNow(), 200);
        if (due.Count == 0)
        {
            return Idle;
        }

        if (await target.HindranceAsync(cancel) is { } hindrance)
        {
            return hindrance;
        }

        var parallel = new ParallelOptions { MaxDegreeOfParallelism = options.Value.Delivery.Parallel, CancellationToken = cancel };
        await Parallel.ForEachAsync(due.GroupBy(delivery => delivery.Patient), parallel, async (patient, token) =>
        {
            foreach (var delivery in patient)
            {
                await SendAsync(delivery, token);
            }
        });
        return TimeSpan.Zero;
    }

    private async Task SendAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        Became became;
        try
        {
            became = await postman.DeliverAsync(delivery, cancel);
        }
        catch (Exception exception) when (exception is not StoreException && !cancel.IsCancellationRequested)
        {
            // One result must not keep the others waiting.
            Trouble.Report(logger, exception, $"Delivery of result {delivery.Identity} failed and is tried again");
            became = new Became.Again(null);
        }

        Sent.Add(1, new KeyValuePair<string, object?>("became", became.GetType().Name));
        await MarkAsync(delivery, became);
    }

    private async Task MarkAsync(Storage.Delivery delivery, Became became)
    {
        switch (became)
        {
            case Became.Nothing:
                await store.MarkNothingToSendAsync(delivery.Identity, delivery.Wanted);
                break;
            case Became.Delivered there:
                await store.MarkDeliveredAsync(delivery.Identity, there.Wanted, there.Id, there.Version, there.Final, there.Retracted);
                if (there.Wanted == delivery.Wanted && EditionRules.Of(delivery) is var (outcome, edition))
                {
                    feed.Delivered(outcome, edition.Revision);
                }

                break;
            case Became.Adopted there:
                await store.AdoptAsync(delivery.Identity, there.Id, there.Version, there.Revision, there.Final, there.Retracted);
                break;
            case Became.Again again:
                var wait = again.After ?? BackOff.After(delivery.Tries, options.Value.Delivery.LongestBackOff, delivery.Identity.ToString());
                await store.MarkRetryAsync(delivery.Identity, delivery.Tries + 1, _time.GetUtcNow() + wait);
                break;
            case Became.Withdrawn:
                logger.LogInformation("A person withdrew result {Identity} at the server; no further edition is sent", delivery.Identity);
                await store.WithdrawnByPersonAsync(delivery.Identity);
                break;
            case Became.Parked parked:
                logger.LogWarning("Result {Identity} is parked: {Code} {Text}", delivery.Identity, parked.Code, parked.Text);
                await store.ParkAsync(delivery.Identity, parked.Code, parked.Text);
                feed.Parked(parked.Code, parked.Text);
                break;
        }
    }
}
