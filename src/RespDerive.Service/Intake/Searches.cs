using System.Diagnostics.Metrics;
using System.Globalization;
using System.Text.Json;
using Microsoft.Extensions.Options;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Service.Intake;

/// <summary>Queries a criterion from its cursor minus the overlap; the cursor moves when everything found is in the journal.</summary>
internal sealed class Searches(Store store, SourceServer source, Ingest ingest, IOptions<ServiceOptions> options, TimeProvider time)
{
    private const int LargestPage = 1000;
    private readonly IntakeOptions _intake = options.Value.Intake;

    private static readonly Counter<long> CutShort = Telemetry.Meter.CreateCounter<long>("respderive.intake.pages_cut_short", "{page}", "Full pages without a next link, after which the search was taken up again");
    private static readonly Counter<long> OneInstant = Telemetry.Meter.CreateCounter<long>("respderive.intake.pages_of_one_instant", "{page}", "Full pages without a next link, all changed at one instant; by whether the largest page held them all");

    /// <summary>Reads everything changed since the cursor.</summary>
    /// <exception cref="Fhir.Server.SearchFailedException">The server could not be asked to the end; the cursor stays.</exception>
    public async Task PollAsync(string criterion, CancellationToken cancel)
    {
        var (name, now) = ("search:" + criterion, time.GetUtcNow());
        var from = store.Cursor(name) is { } kept && DateTimeOffset.TryParse(kept, CultureInfo.InvariantCulture, DateTimeStyles.RoundtripKind, out var cursor)
            ? Earlier(cursor, now) - _intake.Overlap
            : now - _intake.FirstLookBack;
        var size = _intake.PageSize;
        var (latest, more) = await ReadAsync(criterion, from, size, now, cancel);
        while (more)
        {
            // Some servers end a search after one full page without a word: go on from the last change seen.
            if (latest > from)
            {
                CutShort.Add(1);
                (from, size) = (latest, _intake.PageSize);
            }
            else if (size < LargestPage)
            {
                // All of one instant: from there on the same page would come again.
                OneInstant.Add(1, new KeyValuePair<string, object?>("held", true));
                size = LargestPage;
            }
            else
            {
                OneInstant.Add(1, new KeyValuePair<string, object?>("held", false));
                break;
            }

            (latest, more) = await ReadAsync(criterion, from, size, now, cancel);
        }

        await store.SetCursorAsync(new Cursor(name, latest.ToString("O", CultureInfo.InvariantCulture)));
    }

    private async Task<(DateTimeOffset Latest, bool More)> ReadAsync(string criterion, DateTimeOffset from, int size, DateTimeOffset now, CancellationToken cancel)
    {
        var latest = from;
        var more = false;
        var query = $"{criterion}{(criterion.EndsWith('?') ? "" : "&")}_lastUpdated=ge{Uri.EscapeDataString(from.UtcDateTime.ToString("yyyy-MM-ddTHH:mm:ss.fffZ", CultureInfo.InvariantCulture))}"
            + $"&_sort=_lastUpdated&_count={size.ToString(CultureInfo.InvariantCulture)}";
        await foreach (var page in source.Server.SearchAsync(query, cancel))
        {
            foreach (var entry in page.Entries)
            {
                // A change dated in the future must not hide those between now and then.
                var changed = LastUpdated(entry.Resource) is { } sent ? Earlier(sent, now) : from;
                latest = changed > latest ? changed : latest;
            }

            more = !page.HasNext && page.Entries.Count >= size;
            await ingest.AcceptAsync([.. page.Entries.Select(entry => new Brought(entry.Resource, entry.FullUrl))]);
        }

        return (latest, more);
    }

    private static DateTimeOffset Earlier(DateTimeOffset one, DateTimeOffset other) => one < other ? one : other;

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
