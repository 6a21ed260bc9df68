using System.Text.Json;
using Hl7.Fhir.Model;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Service.Operations;
using RespDerive.Storage;
using Task = System.Threading.Tasks.Task;

namespace RespDerive.Service.Intake;

/// <summary>
/// Keeps one rest-hook Subscription per criterion at the source: creates what is missing, asks again for what the server turned off.
/// It is known again by the id the server gave it, since a server may rewrite the criteria; where the store was lost, by the criteria.
/// </summary>
internal sealed class SubscriptionKeeper(Store store, SourceServer source, IOptions<ServiceOptions> options, TimeProvider time, ILogger<SubscriptionKeeper> logger) : Loop(time, logger)
{
    private static readonly TimeSpan Every = TimeSpan.FromMinutes(1);

    /// <summary>True once every criterion had a subscription.</summary>
    public bool Kept { get; private set; }

    protected override async Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        var intake = options.Value.Intake;
        if (!intake.Subscribe)
        {
            return TimeSpan.FromHours(1);
        }

        Dictionary<string, (string Id, string? Status)>? known = null;
        foreach (var criterion in intake.Searches)
        {
            var name = $"subscription:{intake.Endpoint!.AbsoluteUri} {criterion}";
            var there = store.Cursor(name) is { } id ? await StatusAsync(id, cancel) : null;
            if (there is null)
            {
                known ??= await KnownAsync(intake.Endpoint, cancel);
                there = known.TryGetValue(criterion, out var found) ? found : null;
            }

            if (there is not { } one)
            {
                await LookAsync(await source.Server.CreateAsync(Subscription(criterion, intake), null, cancel), criterion, name);
            }
            else if (one.Status is "error" or "off")
            {
                var again = Subscription(criterion, intake);
                again.Id = one.Id;
                await LookAsync(await source.Server.UpdateAsync(again, null, cancel), criterion, name);
            }
        }

        Kept = true;
        return Every;
    }

    /// <summary>Null when the server has it no more; an answer that says nothing leaves it as it is until the next round.</summary>
    private async Task<(string Id, string? Status)?> StatusAsync(string id, CancellationToken cancel)
    {
        var answer = await source.Server.ReadAsync($"Subscription/{id}", cancel);
        if (!answer.Found)
        {
            return answer.Status is 404 or 410 ? null : (id, null);
        }

        using var json = JsonDocument.Parse(answer.Body);
        return (id, json.RootElement.Text("status"));
    }

    private async Task LookAsync(ServerAnswer answer, string criterion, string name)
    {
        if (answer is ServerAnswer.Delivered kept)
        {
            await store.SetCursorAsync(new Cursor(name, kept.Id));
        }
        else
        {
            logger.LogWarning("No subscription for {Type}: {Answer}; polling goes on", criterion.Split('?')[0], answer.GetType().Name);
        }
    }

    private async Task<Dictionary<string, (string Id, string? Status)>> KnownAsync(Uri endpoint, CancellationToken cancel)
    {
        var known = new Dictionary<string, (string, string?)>(StringComparer.Ordinal);
        await foreach (var page in source.Server.SearchAsync("Subscription?_count=200", cancel))
        {
            foreach (var entry in page.Entries)
            {
                using var json = JsonDocument.Parse(entry.Resource);
                var root = json.RootElement;
                if (root.Member("channel").Text("endpoint") == endpoint.AbsoluteUri
                    && root.Text("criteria") is { } criterion && root.Text("id") is { } id)
                {
                    known[criterion] = (id, root.Text("status"));
                }
            }
        }

        return known;
    }

    private static Subscription Subscription(string criterion, IntakeOptions intake) => new()
    {
        Status = Hl7.Fhir.Model.Subscription.SubscriptionStatus.Requested,
        Reason = "Inputs of derived respiratory values",
        Criteria = criterion,
        Channel = new Subscription.ChannelComponent
        {
            Type = Hl7.Fhir.Model.Subscription.SubscriptionChannelType.RestHook,
            Endpoint = intake.Endpoint!.AbsoluteUri,
            Payload = intake.Payload ? "application/fhir+json" : null,
            Header = intake.NotificationAuthorization is { } secret ? [$"Authorization: {secret}"] : [],
        },
    };
}
