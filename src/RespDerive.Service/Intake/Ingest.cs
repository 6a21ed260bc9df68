using System.Diagnostics.Metrics;
using Orleans;
using RespDerive.Fhir;
using RespDerive.Service.Operations;
using RespDerive.Service.Patients;
using RespDerive.Storage;

namespace RespDerive.Service.Intake;

/// <summary>One resource as a channel brought it.</summary>
/// <param name="Body">JSON.</param>
/// <param name="FullUrl">Address of its Bundle entry; null outside a Bundle.</param>
internal sealed record Brought(ReadOnlyMemory<byte> Body, string? FullUrl);

/// <summary>
/// The step all channels share: facts, journal, wake. When the task completes, everything that can be kept is on disk;
/// only then may a sender be answered or a cursor be moved.
/// </summary>
internal sealed class Ingest(Store store, Site site, IGrainFactory grains, TimeProvider time, Feed feed)
{
    private static readonly Counter<long> Refused = Telemetry.Meter.CreateCounter<long>("respderive.intake.refused", "{resource}", "Resources not journalled, by reason");
    private static readonly Counter<long> Journalled = Telemetry.Meter.CreateCounter<long>("respderive.intake.journalled", "{resource}", "New resource versions");

    /// <summary>Journals resources; the answer gives, per resource, the reason it was not kept, or null.</summary>
    public async Task<IReadOnlyList<string?>> AcceptAsync(IReadOnlyList<Brought> brought)
    {
        var now = time.GetUtcNow();
        var reasons = new string?[brought.Count];
        var arrivals = new List<Arrival>();
        for (var i = 0; i < brought.Count; i++)
        {
            var result = FactReader.Read(brought[i].Body, site.Source, site.SourceBase, brought[i].FullUrl, now);
            reasons[i] = result.Refused ?? (site.IsOwn(result.Facts!) ? "own-output" : null);
            if (reasons[i] is { } reason)
            {
                Refused.Add(1, new KeyValuePair<string, object?>("reason", reason));
            }
            else
            {
                arrivals.Add(ArrivalOf(result.Facts!, brought[i].Body));
            }
        }

        var appended = arrivals.Count == 0 ? [] : await store.AppendAsync(arrivals);
        for (var i = 0; i < appended.Count; i++)
        {
            if (appended[i].New)
            {
                Journalled.Add(1);
                feed.Received(arrivals[i].Key.Type);
            }
        }

        await WakeAsync(appended.SelectMany(one => one.Patients));
        return reasons;
    }

    /// <summary>Journals that a resource cannot be read at the source any more, so that nothing waits for it.</summary>
    public async Task GoneAsync(Timeline.ResourceKey key)
    {
        var now = time.GetUtcNow();
        var known = store.Find(key.Source, key.Reference);
        if (known is { Gone: true })
        {
            return;
        }

        var order = Arrival.GoneAfter(known?.Order ?? new Timeline.VersionOrder(null, null, ""));
        var appended = await store.AppendAsync([new Arrival { Key = key, Version = "gone", Order = order, Patient = known?.Patient, Arrived = now, Gone = true }]);
        await WakeAsync(appended.SelectMany(one => one.Patients));
    }

    private async Task WakeAsync(IEnumerable<long> patients)
    {
        foreach (var patient in patients.Distinct())
        {
            await grains.GetGrain<IPatientGrain>(patient).Wake();
        }
    }

    private static Arrival ArrivalOf(ResourceFacts facts, ReadOnlyMemory<byte> body) => new()
    {
        Key = facts.Key,
        Base = facts.Base,
        Version = facts.Version,
        Order = facts.Order,
        Patient = facts.Patient,
        Body = body,
        Arrived = facts.Arrived,
        References = [.. facts.References.Where(reference => reference != facts.Patient).Distinct(StringComparer.Ordinal)],
    };
}
