using System.Text.Json;
using Hl7.Fhir.Model;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Service.Operations;

namespace RespDerive.Service.Intake;

/// <summary>Keeps one rest-hook Subscription per criterion at the source: creates what is missing, asks again for what the server turned off.</summary>
internal sealed class SubscriptionKeeper(SourceServer source, IOptions<ServiceOptions> options, TimeProvider time, ILogger<SubscriptionKeeper> logger) : Loop(time, logger)
{
    private static readonly TimeSpan Every = TimeSpan.FromMinutes(1);

    /// <summary>True once every criterion had a subscription.</summary>
    public bool Kept { get; private set; }

    protected override async System.Threading.Tasks.Task<TimeSpan> RoundAsync(CancellationToken cancel)
    {
        var intake = options.Value.Intake;
        if (!intake.Subscribe)
        {
            return TimeSpan.FromHours(1);
        }

        var known = await KnownAsync(intake.Endpoint!, cancel);
        foreach (var criterion in intake.Searches)
        {
            if (!known.TryGetValue(criterion, out var there))
            {
                Look(await source.Server.CreateAsync(Subscription(criterion, intake), null, cancel), criterion);
            }
            else if (there.Status is "error" or "off")
            {
                var again = Subscription(criterion, intake);
                again.Id = there.Id;
                Look(await source.Server.UpdateAsync(again, null, cancel), criterion);
            }
        }

        Kept = true;
        return Every;
    }

    private void Look(ServerAnswer answer, string criterion)
    {
        if (answer is not ServerAnswer.Delivered)
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
                if (root.TryGetProperty("channel", out var channel) && Text(channel, "endpoint") == endpoint.AbsoluteUri
                    && Text(root, "criteria") is { } criterion && Text(root, "id") is { } id)
                {
                    known[criterion] = (id, Text(root, "status"));
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

    private static string? Text(JsonElement json, string name) =>
        json.TryGetProperty(name, out var text) && text.ValueKind == JsonValueKind.String ? text.GetString() : null;
}
