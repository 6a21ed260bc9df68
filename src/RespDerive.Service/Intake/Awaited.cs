using Microsoft.Extensions.Logging;
using RespDerive.Fhir.Server;
using RespDerive.Service.Operations;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Intake;

/// <summary>Fetches what was named but not brought: references of readings, and queries after an empty notification.</summary>
internal sealed class Awaited(Store store, SourceServer source, Lazy<Ingest> ingest, Lazy<Searches> searches, TimeProvider time, ILogger<Awaited> logger)
    : Loop(time, logger)
{
    /// <summary>Marks a fetch row that is a search to be queried again, not a reference.</summary>
    public const string QueryMark = "?";

    private const int TriesWithoutAnswer = 5;
    private static readonly TimeSpan Idle = TimeSpan.FromSeconds(1);
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
            await ingest.Value.AcceptAsync([new Brought(answer.Body, $"{source.Base}/{fetch.Target}")]);
            await store.FetchDoneAsync(fetch);
        }
        else if (answer.Status is 410 || (answer.Status is 404 or 403 && fetch.Tries + 1 >= TriesWithoutAnswer))
        {
            var parts = fetch.Target.Split('/');
            await ingest.Value.GoneAsync(new ResourceKey(fetch.Source, parts[0], parts[1]));
            await store.FetchDoneAsync(fetch);
        }
        else
        {
            await AgainAsync(fetch, answer.After);
        }
    }

    private Task AgainAsync(Fetch fetch, TimeSpan? after) =>
        store.FetchRetryAsync(fetch.Id, fetch.Tries + 1, _time.GetUtcNow() + (after ?? BackOff.After(fetch.Tries, TimeSpan.FromMinutes(5), fetch.Target)));
}
