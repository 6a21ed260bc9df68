using System.Globalization;
using System.Text.RegularExpressions;

namespace RespDerive.Fhir.Server;

/// <summary>What an HTTP answer that is not a success means for a write. Pure.</summary>
/// <remarks>
/// Statuses as in RFC 9110, 6585 and 8470; FHIR R4 HTTP: 412 is a version or match conflict, servers also use 409.
/// Credentials refused (401) say nothing about the item, so it waits.
/// </remarks>
public static partial class DeliveryVerdict
{
    /// <summary>The verdict.</summary>
    /// <param name="status">HTTP status, not 2xx.</param>
    /// <param name="body">The body; an OperationOutcome, or anything a proxy made up.</param>
    /// <param name="retryAfter">Retry-After header: seconds or HTTP-date.</param>
    /// <param name="rateLimit">RateLimit header of the IETF draft: <c>"name";r=0;t=43</c>.</param>
    /// <param name="now">For Retry-After as a date.</param>
    public static ServerAnswer Of(int status, ReadOnlyMemory<byte> body, string? retryAfter, string? rateLimit, DateTimeOffset now) => status switch
    {
        401 => new ServerAnswer.Retry(Wait(retryAfter, rateLimit, now), false),
        _ when IsTransient(status) => new ServerAnswer.Retry(Wait(retryAfter, rateLimit, now), status is 408 or >= 500),
        409 or 412 => new ServerAnswer.Conflict(),
        410 => new ServerAnswer.Gone(),
        >= 300 and < 400 => new ServerAnswer.Parked("redirect", $"HTTP {Number(status)}: the server redirects; configure its real address."),
        _ => Refusal(status, body),
    };

    /// <summary>True for a status that may be gone on the next try.</summary>
    public static bool IsTransient(int status) => status is 408 or 425 or 429 or >= 500;

    /// <summary>How long the server asks to wait; null when it does not say. Never negative.</summary>
    public static TimeSpan? Wait(string? retryAfter, string? rateLimit, DateTimeOffset now)
    {
        if (int.TryParse(retryAfter, NumberStyles.None, CultureInfo.InvariantCulture, out var seconds))
        {
            return TimeSpan.FromSeconds(seconds);
        }

        if (DateTimeOffset.TryParseExact(retryAfter, "r", CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out var date))
        {
            return date > now ? date - now : TimeSpan.Zero;
        }

        return rateLimit is not null && Exhausted().IsMatch(rateLimit) && Reset().Match(rateLimit) is { Success: true } reset
            && int.TryParse(reset.Groups[1].ValueSpan, NumberStyles.None, CultureInfo.InvariantCulture, out var left)
            ? TimeSpan.FromSeconds(left)
            : null;
    }

    private static ServerAnswer.Parked Refusal(int status, ReadOnlyMemory<byte> body)
    {
        var issues = OutcomeIssue.Read(body);
        var code = issues.Count > 0 ? issues[0].Code : $"http-{Number(status)}";
        var places = string.Join("; ", issues.Take(3).Select(issue => issue.Place is { } place ? $"{issue.Code} at {place}" : issue.Code));
        return new ServerAnswer.Parked(code, issues.Count > 0 ? $"HTTP {Number(status)}: {places}" : $"HTTP {Number(status)} without an OperationOutcome");
    }

    private static string Number(int status) => status.ToString(CultureInfo.InvariantCulture);

    [GeneratedRegex(@"(^|[;,\s])r=0([;,\s]|$)")]
    private static partial Regex Exhausted();

    [GeneratedRegex(@"(?:^|[;,\s])t=(\d+)")]
    private static partial Regex Reset();
}
