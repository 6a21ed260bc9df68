using System.Globalization;
using System.Text.Json;
using Microsoft.Extensions.Options;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Service.Intake;

/// <summary>Queries a criterion from its cursor minus the overlap; the cursor moves in the transaction that journals what was found.</summary>
internal sealed class Searches(Store store, SourceServer source, Ingest ingest, IOptions<ServiceOptions> options, TimeProvider time)
{
    private readonly IntakeOptions _intake = options.Value.Intake;

    /// <summary>Reads everything changed since the cursor.</summary>
    /// <exception cref="Fhir.Server.SearchFailedException">The server could not be asked to the end; the cursor stands at the last whole page.</exception>
    public async Task PollAsync(string criterion, CancellationToken cancel)
    {
        var name = "search:" + criterion;
        var from = store.Cursor(name) is { } kept && DateTimeOffset.TryParse(kept, CultureInfo.InvariantCulture, DateTimeStyles.RoundtripKind, out var cursor)
            ? cursor - _intake.Overlap
            : time.GetUtcNow() - _intake.FirstLookBack;
        while (await ReadAsync(criterion, name, from, cancel) is { } latest && latest > from)
        {
            from = latest;
        }
    }

    /// <summary>
    /// Reads what changed since a time. Some servers fill one page and give no next link: then the answer is the time to go on from.
    /// Null when all was read.
    /// </summary>
    private async Task<DateTimeOffset?> ReadAsync(string criterion, string name, DateTimeOffset from, CancellationToken cancel)
    {
        var latest = from;
        var (pages, full) = (0, false);
        var query = $"{criterion}{(criterion.EndsWith('?') ? "" : "&")}_lastUpdated=ge{Uri.EscapeDataString(from.UtcDateTime.ToString("yyyy-MM-ddTHH:mm:ss.fffZ", CultureInfo.InvariantCulture))}"
            + $"&_sort=_lastUpdated&_count={_intake.PageSize.ToString(CultureInfo.InvariantCulture)}";
        await foreach (var page in source.Server.SearchAsync(query, cancel))
        {
            foreach (var entry in page.Entries)
            {
                var changed = LastUpdated(entry.Resource);
                latest = changed > latest ? changed.Value : latest;
            }

            // Where the server does not say that it sorted, older changes may stand on a later page.
            var all = !page.HasNext || page.Self?.Contains("_sort=", StringComparison.Ordinal) == true;
            var moved = all && latest > from ? new Cursor(name, latest.ToString("O", CultureInfo.InvariantCulture)) : null;
            await ingest.AcceptAsync([.. page.Entries.Select(entry => new Brought(entry.Resource, entry.FullUrl))], moved);
            pages++;
            full = page.Entries.Count >= _intake.PageSize && !page.HasNext;
        }

        return full && pages == 1 ? latest : null;
    }

    private static DateTimeOffset? LastUpdated(byte[] resource)
    {
        try
        {
            using var json = JsonDocument.Parse(resource);
            return json.RootElement.TryGetProperty("meta", out var meta) && meta.TryGetProperty("lastUpdated", out var text)
                && DateTimeOffset.TryParse(text.GetString(), CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out var time) ? time : null;
        }
        catch (Exception exception) when (exception is JsonException or InvalidOperationException)
        {
            return null;
        }
    }
}

/// <summary>Polls every criterion: first-class intake where the source sends no notifications, and the net under notifications where it does.</summary>
internal sealed class Poller(Searches searches, SourceServer source, IOptions<ServiceOptions> options, TimeProvider time, Microsoft.Extensions.Logging.ILogger<Poller> logger) : Loop(time, logger)
{
    /// <summary>Completes with the first round that reached every criterion.</summary>
    public bool HasPolled { get; private set; }

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        var intake = options.Value.Intake;
        if (!source.IsConfigured || (intake.PollEvery == TimeSpan.Zero && HasPolled))
        {
            HasPolled = true;
            return TimeSpan.FromHours(1);
        }

        foreach (var criterion in intake.Searches)
        {
            await searches.PollAsync(criterion, cancel);
        }

        HasPolled = true;
        return intake.PollEvery;
    }
}
