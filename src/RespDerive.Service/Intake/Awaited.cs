using Microsoft.Extensions.Logging;
using RespDerive.Fhir.Server;
using RespDerive.Service.Operations;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Intake;

/// <summary>Fetches what was named but not brought: references of readings, and queries after an empty notification.</summary>
internal sealed class Awaited(Store store, SourceServer source, Lazy<Ingest> ingest, Lazy<Searches> searches, Disappearances disappearances, TimeProvider time, ILogger<Awaited> logger)
    : Loop(time, logger)
{
    /// <summary>Marks a fetch row that is a search to be queried again, not a reference.</summary>
    public const string QueryMark = "?";

    /// <summary>A resource that was never there is given up when so many reads in a row found nothing, so that what waits for it goes on without it.</summary>
    private const int ReadsOfTheUnknown = 5;

    private static readonly TimeSpan Idle = TimeSpan.FromSeconds(1);
    private static readonly TimeSpan Longest = TimeSpan.FromMinutes(5);
    private readonly TimeProvider _time = time;

    /// <summary>True for a relative reference to a resource of the source.</summary>
    public bool CanBeFetched(string reference) =>
        source.IsConfigured && reference.Count(c => c == '/') == 1 && char.IsAsciiLetterUpper(reference[0]) && !reference.Contains(':', StringComparison.Ordinal);

    /// <summary>True when a reading must wait for the resource: it decides what the reading means.</summary>
    public static bool Decides(string reference) =>
        reference.StartsWith("Specimen/", StringComparison.Ordinal) || reference.StartsWith("DeviceMetric/", StringComparison.Ordinal);

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        var due = store.DueFetches(_time.GetUtcNow(), 100);
        await Parallel.ForEachAsync(due, new ParallelOptions { MaxDegreeOfParallelism = 4, CancellationToken = cancel }, async (fetch, token) =>
        {
            if (fetch.Target.StartsWith(QueryMark, StringComparison.Ordinal))
            {
                await QueryAsync(fetch, token);
            }
            else
            {
                await ReadAsync(fetch, token);
            }
        });
        return due.Count > 0 ? TimeSpan.Zero : Idle;
    }

    private async Task QueryAsync(Fetch fetch, CancellationToken cancel)
    {
        try
        {
            await searches.Value.PollAsync(fetch.Target[QueryMark.Length..], cancel);
            await store.FetchDoneAsync(fetch);
        }
        catch (SearchFailedException)
        {
            await AgainAsync(fetch, null);
        }
    }

    private async Task ReadAsync(Fetch fetch, CancellationToken cancel)
    {
        var answer = await source.Server.ReadAsync(fetch.Target, cancel);
        if (answer.Found)
        {
            await ingest.Value.AcceptAsync([new Brought(answer.Body, $"{source.Base}/{fetch.Target}") { Read = true }]);
            await store.FetchDoneAsync(fetch);
        }
        else if (answer.Status == 410)
        {
            await GoneAsync(fetch);
        }
        else if (answer.Status is 404 or 403)
        {
            await (store.Find(fetch.Source, fetch.Target) is { } known ? VanishedAsync(fetch, known, cancel) : UnknownAsync(fetch));
        }
        else
        {
            await AgainAsync(fetch, answer.After);
        }
    }

    private async Task UnknownAsync(Fetch fetch)
    {
        if (fetch.Missing + 1 >= ReadsOfTheUnknown)
        {
            await GoneAsync(fetch);
        }
        else
        {
            var now = _time.GetUtcNow();
            await store.FetchMissingAsync(fetch.Id, now, now + BackOff.After(fetch.Missing, Longest, fetch.Target));
        }
    }

    /// <summary>Only a read in which the control could be read counts, and any other answer starts the count anew.</summary>
    private async Task VanishedAsync(Fetch fetch, ResourceBody known, CancellationToken cancel)
    {
        var now = _time.GetUtcNow();
        if (known.Gone)
        {
            await store.FetchDoneAsync(fetch);
        }
        else if (!await RecordIsReadableAsync(known, cancel))
        {
            await store.FetchRetryAsync(fetch.Id, fetch.Tries + 1, now + Disappearances.BetweenReads);
        }
        else if (Disappearances.IsLast(fetch.Missing, fetch.MissingSince, now) && disappearances.Allow(now))
        {
            await GoneAsync(fetch);
        }
        else
        {
            await store.FetchMissingAsync(fetch.Id, now, now + Disappearances.BetweenReads);
        }
    }

    /// <summary>The control: if not even the patient can be read, the fault is ours or the server's.</summary>
    private async Task<bool> RecordIsReadableAsync(ResourceBody known, CancellationToken cancel) =>
        known.Patient is { } patient && patient != known.Key.Reference && CanBeFetched(patient)
            ? (await source.Server.ReadAsync(patient, cancel)).Found
            : await source.Server.ProbeAsync(cancel) is not null;

    private async Task GoneAsync(Fetch fetch)
    {
        var parts = fetch.Target.Split('/');
        await ingest.Value.GoneAsync(new ResourceKey(fetch.Source, parts[0], parts[1]));
        await store.FetchDoneAsync(fetch);
    }

    private Task AgainAsync(Fetch fetch, TimeSpan? after) =>
        store.FetchRetryAsync(fetch.Id, fetch.Tries + 1, _time.GetUtcNow() + (after ?? BackOff.After(fetch.Tries, Longest, fetch.Target)));
}
