using System.Text.Json;

namespace RespDerive.Fhir.Server;

/// <summary>An HTTP answer, read to its end; status 0 when none came.</summary>
internal sealed record HttpReply(int Status, byte[] Body)
{
    public string? ETag { get; init; }

    public string? Location { get; init; }

    public string? RetryAfter { get; init; }

    public string? RateLimit { get; init; }

    public bool Foreign { get; init; }

    public bool MayBeWritten { get; init; }

    public static async Task<HttpReply> Of(HttpResponseMessage response, CancellationToken cancel) =>
        new((int)response.StatusCode, await response.Content.ReadAsByteArrayAsync(cancel))
        {
            // Raw strings: servers send what the typed headers refuse.
            ETag = First(response, "ETag"),
            Location = First(response, "Location") ?? First(response, "Content-Location"),
            RetryAfter = First(response, "Retry-After"),
            RateLimit = First(response, "RateLimit"),
        };

    /// <summary>The body as JSON; null for HTML, text or nothing.</summary>
    public JsonDocument? Parsed()
    {
        try
        {
            return JsonDocument.Parse(Body);
        }
        catch (JsonException)
        {
            return null;
        }
    }

    /// <summary>True when no connection was made, so that nothing can have been written.</summary>
    public static bool NeverLeft(Exception exception) => exception is HttpRequestException
    {
        HttpRequestError: HttpRequestError.NameResolutionError or HttpRequestError.ConnectionError or HttpRequestError.SecureConnectionError or HttpRequestError.ProxyTunnelError,
    };

    private static string? First(HttpResponseMessage response, string name)
    {
        foreach (var header in response.Headers.NonValidated.Concat(response.Content.Headers.NonValidated))
        {
            if (header.Key.Equals(name, StringComparison.OrdinalIgnoreCase))
            {
                return header.Value.FirstOrDefault();
            }
        }

        return null;
    }
}
