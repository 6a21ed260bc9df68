using System.Diagnostics.Metrics;
using Orleans;
using RespDerive.Fhir;
using RespDerive.Physiology;
using RespDerive.Service.Operations;
using RespDerive.Service.Patients;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Intake;

/// <summary>One resource as a channel brought it.</summary>
/// <param name="Body">JSON.</param>
/// <param name="FullUrl">Address of its Bundle entry; null outside a Bundle.</param>
internal sealed record Brought(ReadOnlyMemory<byte> Body, string? FullUrl)
{
    /// <summary>The source gave it just now in answer to a read of its address: unlike a notification or a search, that cannot lag behind.</summary>
    public bool Read { get; init; }

    /// <summary>References of the entries of the same Bundle by their URNs.</summary>
    public IReadOnlyDictionary<string, string> Links { get; init; } = new Dictionary<string, string>();
}

/// <summary>
/// The step all channels share: facts, journal, wake. When the task completes, everything that can be kept is on disk;
/// only then may a sender be answered or a cursor be moved.
/// </summary>
internal sealed class Ingest(Store store, Site site, Awaited awaited, IGrainFactory grains, TimeProvider time, Feed feed)
{
    private static readonly Counter<long> Refused = Telemetry.Meter.CreateCounter<long>("respderive.intake.refused", "{resource}", "Resources not journalled or of no use, by reason");
    private static readonly Counter<long> Journalled = Telemetry.Meter.CreateCounter<long>("respderive.intake.journalled", "{resource}", "New resource versions");

    /// <summary>Journals resources; the answer gives, per resource, the reason it was not kept, or null.</summary>
    public async Task<IReadOnlyList<string?>> AcceptAsync(IReadOnlyList<Brought> brought)
    {
        var now = time.GetUtcNow();
        var reasons = new string?[brought.Count];
        var arrivals = new List<Arrival>();
        var lacking = new List<bool>();
        for (var i = 0; i < brought.Count; i++)
        {
            var result = FactReader.Read(brought[i].Body, site.Source, site.SourceBase, brought[i].FullUrl, now, brought[i].Links);
            reasons[i] = result.Refused ?? (site.IsOwn(result.Facts!) ? "own-output" : null);
            if (reasons[i] is { } reason)
            {
                Refused.Add(1, new KeyValuePair<string, object?>("reason", reason));
            }
            else
            {
                arrivals.Add(ArrivalOf(result.Facts!, brought[i]));
                lacking.Add(result.Facts!.LacksPatient);
            }
        }

        var appended = arrivals.Count == 0 ? [] : await store.AppendAsync(arrivals);
        for (var i = 0; i < appended.Count; i++)
        {
            if (appended[i].New)
            {
                Journalled.Add(1);
                feed.Received(arrivals[i].Key.Type);
                if (lacking[i])
                {
                    Refused.Add(1, new KeyValuePair<string, object?>("reason", Withheld.NoPatient));
                }
            }
        }

        await WakeAsync(appended.SelectMany(one => one.Patients));
        await LookAgainAsync([.. arrivals.Where((arrival, i) => appended[i].Withdrawn && awaited.CanBeFetched(arrival.Key.Reference)).Select(arrival => arrival.Key.Reference)]);
        return reasons;
    }

    /// <summary>Journals that a resource cannot be read at the source any more, so that nothing waits for it.</summary>
    public async Task GoneAsync(ResourceKey key)
    {
        var now = time.GetUtcNow();
        var known = store.Find(key.Source, key.Reference);
        if (known is { Gone: true })
        {
            return;
        }

        var order = Arrival.GoneAfter(known?.Order ?? new VersionOrder(null, null, ""));
        var appended = await store.AppendAsync([new Arrival { Key = key, Version = "gone", Order = order, Patient = known?.Patient, Arrived = now, Gone = true }]);
        await WakeAsync(appended.SelectMany(one => one.Patients));
    }

    /// <summary>What was withdrawn and yet comes again may be back, or be late news of before: a read will tell.</summary>
    private async Task LookAgainAsync(IReadOnlyList<string> references)
    {
        if (references.Count > 0)
        {
            await store.AddFetchesAsync(site.Source, references, time.GetUtcNow());
            awaited.Hurry();
        }
    }

    /// <summary>A version that is read after its withdrawal reopens the resource, also when it is no newer than the one withdrawn.</summary>
    private VersionOrder OrderOf(ResourceFacts facts, bool read) =>
        read && store.Find(facts.Key.Source, facts.Key.Reference) is { Gone: true } gone && (facts.Order.IsUnordered || facts.Order.CompareTo(gone.Order) < 0)
            ? Arrival.SeenAfter(gone.Order) : facts.Order;

    private async Task WakeAsync(IEnumerable<long> patients)
    {
        foreach (var patient in patients.Distinct())
        {
            await grains.GetGrain<IPatientGrain>(patient).Wake();
        }
    }

    private Arrival ArrivalOf(ResourceFacts facts, Brought brought) => new()
    {
        Key = facts.Key,
        Base = facts.Base,
        Version = facts.Version,
        Order = OrderOf(facts, brought.Read),
        Patient = facts.Patient,
        Body = brought.Body,
        Links = brought.Links,
        Names = [.. facts.Identifiers.Select(identifier => identifier.Reference).Distinct(StringComparer.Ordinal)],
        Arrived = facts.Arrived,
        References = [.. facts.References.Where(reference => reference != facts.Patient).Distinct(StringComparer.Ordinal)],
    };
}
