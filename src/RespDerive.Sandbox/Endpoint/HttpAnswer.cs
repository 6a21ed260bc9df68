using System.Globalization;
using Microsoft.AspNetCore.Http;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>Between ASP.NET and the endpoint's own messages.</summary>
internal static class HttpAnswer
{
    public static async Task<FhirRequest> Receive(HttpContext http, PathString path)
    {
        using var body = new MemoryStream();
        await http.Request.Body.CopyToAsync(body, http.RequestAborted).ConfigureAwait(false);
        string? Header(string name) => http.Request.Headers.TryGetValue(name, out var value) ? value.ToString() : null;
        return new FhirRequest(http.Request.Method.ToUpperInvariant(), path.Value?.Trim('/') ?? "", http.Request.QueryString.Value ?? "")
        {
            Body = body.ToArray(),
            IfMatch = Header("If-Match"),
            IfNoneMatch = Header("If-None-Match"),
            IfNoneExist = Header("If-None-Exist"),
            Prefer = Header("Prefer"),
            ContentType = http.Request.ContentType,
        };
    }

    public static async Task Send(HttpContext http, FhirAnswer answer, FhirRequest? request, TimeSpan? retryAfter = null)
    {
        var response = http.Response;
        response.StatusCode = answer.Status;
        if (answer.About is { } about)
        {
            response.Headers.ETag = about.ETag;
            response.Headers.LastModified = about.LastUpdated.ToString("R", CultureInfo.InvariantCulture);
        }
        if (answer.Location is { } location)
        {
            response.Headers.Location = location;
        }
        if (answer.Allow is { } allow)
        {
            response.Headers.Allow = allow;
        }
        if (retryAfter is { } wait)
        {
            response.Headers.RetryAfter = Math.Ceiling(wait.TotalSeconds).ToString(CultureInfo.InvariantCulture);
        }
        var body = Body(answer, request);
        if (body.Length > 0)
        {
            response.ContentType = "application/fhir+json; charset=utf-8";
            response.ContentLength = body.Length;
            await response.Body.WriteAsync(body, http.RequestAborted).ConfigureAwait(false);
        }
    }

    // "Prefer: return=…" is about the answer to a successful write.
    private static byte[] Body(FhirAnswer answer, FhirRequest? request)
    {
        var written = answer is { Status: 200 or 201, Location: not null };
        return written && request!.Prefers("return=minimal") ? []
            : written && request!.Prefers("return=OperationOutcome") ? FhirAnswer.Outcome("information", "informational", "stored")
            : answer.Body;
    }
}
