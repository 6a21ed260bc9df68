using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Http;
using Microsoft.AspNetCore.Routing;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Service.Intake;

/// <summary>
/// Where notifications arrive: PUT or POST of a resource on any path below, an empty POST ("something changed"), a Bundle of a
/// topic-based notification, DELETE. Answered 2xx only when what it says, or that it must be fetched, is on disk.
/// </summary>
internal sealed class Webhook(Store store, Ingest ingest, Awaited awaited, Site site, IOptions<ServiceOptions> options, TimeProvider time, ILogger<Webhook> logger)
{
    /// <summary>Path of the endpoint.</summary>
    public const string Path = "/notify";

    private readonly byte[]? _secret = options.Value.Intake.NotificationAuthorization is { } secret ? Encoding.UTF8.GetBytes(secret) : null;

    public static void Map(IEndpointRouteBuilder routes)
    {
        routes.Map(Path + "/{**rest}", (HttpContext context, Webhook webhook) => webhook.TakeAsync(context));
    }

    private async Task TakeAsync(HttpContext context)
    {
        var request = context.Request;
        if (_secret is not null && !CryptographicOperations.FixedTimeEquals(_secret, Encoding.UTF8.GetBytes(request.Headers.Authorization.ToString())))
        {
            await AnswerAsync(context, 401, "security", "The notification does not carry the agreed Authorization header.");
            return;
        }

        if (request.Method is not ("POST" or "PUT" or "DELETE"))
        {
            await AnswerAsync(context, 405, "not-supported", "Notifications are POST, PUT or DELETE.");
            return;
        }

        byte[] body;
        try
        {
            body = await BodyAsync(request, context.RequestAborted);
        }
        catch (BadHttpRequestException exception)
        {
            await AnswerAsync(context, exception.StatusCode, "too-long", "The notification is too large or broken off.");
            return;
        }

        try
        {
            await TakeAsync(context, request, body);
        }
        catch (StoreException exception)
        {
            // Nothing was kept, so the sender must come again.
            Trouble.Report(logger, exception, "A notification could not be journalled");
            context.Response.Headers.RetryAfter = "30";
            await AnswerAsync(context, 503, "no-store", "The notification could not be stored; send it again.");
        }
    }

    private async Task TakeAsync(HttpContext context, HttpRequest request, byte[] body)
    {
        if (request.Method == "DELETE")
        {
            var parts = request.Path.Value![Path.Length..].Split('/', StringSplitOptions.RemoveEmptyEntries);
            await FetchAsync(parts.Length >= 2 ? [$"{parts[^2]}/{parts[^1]}"] : Everything());
        }
        else if (body.AsSpan().Trim(" \t\r\n"u8).Length is 0 or 2)
        {
            // No content, or an empty object: something changed, and only the criteria say what to ask for.
            await FetchAsync(Everything());
        }
        else if (!await TakeContentAsync(body))
        {
            await AnswerAsync(context, 400, "structure", "The notification is not JSON of a FHIR resource.");
            return;
        }

        await AnswerAsync(context, 200, "informational", "Taken.", "information");
    }

    /// <summary>Journals the resource, or everything a Bundle brings or names. False when it is no FHIR JSON.</summary>
    private async Task<bool> TakeContentAsync(byte[] body)
    {
        var notification = Notification.Read(body);
        if (notification is null)
        {
            return false;
        }

        await FetchAsync(notification.Named);
        if (notification.Brought.Count == 0)
        {
            return true;
        }

        var reasons = await ingest.AcceptAsync(notification.Brought);
        return !reasons.All(reason => reason is Fhir.Refusals.NotJson or Fhir.Refusals.NotFhir);
    }

    private IReadOnlyList<string> Everything() => [.. options.Value.Intake.Searches.Select(criterion => Awaited.QueryMark + criterion)];

    private async Task FetchAsync(IReadOnlyList<string> targets)
    {
        if (targets.Count > 0)
        {
            await store.AddFetchesAsync(site.Source, targets, time.GetUtcNow());
            awaited.Hurry();
        }
    }

    private static async Task<byte[]> BodyAsync(HttpRequest request, CancellationToken cancel)
    {
        using var buffer = new MemoryStream();
        await request.Body.CopyToAsync(buffer, cancel);
        return buffer.ToArray();
    }

    /// <summary>Some senders take an answer for failure unless it is a FHIR resource, so every answer is one.</summary>
    private static async Task AnswerAsync(HttpContext context, int status, string code, string text, string severity = "error")
    {
        context.Response.StatusCode = status;
        context.Response.ContentType = "application/fhir+json; charset=utf-8";
        await using var writer = new Utf8JsonWriter(context.Response.BodyWriter);
        writer.WriteStartObject();
        writer.WriteString("resourceType", "OperationOutcome");
        writer.WriteStartArray("issue");
        writer.WriteStartObject();
        writer.WriteString("severity", severity);
        writer.WriteString("code", code);
        writer.WriteString("diagnostics", text);
        writer.WriteEndObject();
        writer.WriteEndArray();
        writer.WriteEndObject();
    }
}
