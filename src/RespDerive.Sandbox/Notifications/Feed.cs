using System.Net.Http.Headers;
using System.Threading.Channels;
using RespDerive.Sandbox.Endpoint;

namespace RespDerive.Sandbox.Notifications;

/// <summary>
/// One subscription's queue: notifications leave in order, one at a time, with a few attempts each.
/// With a payload type the server updates the resource at the endpoint (<c>PUT {endpoint}/{Type}/{id}</c>), without
/// one it posts an empty message (R4 Subscription, "REST Hook").
/// </summary>
internal sealed class Feed : IAsyncDisposable
{
    private readonly Channel<StoredVersion> _queue = Channel.CreateUnbounded<StoredVersion>(new UnboundedChannelOptions { SingleReader = true });
    private readonly CancellationTokenSource _stop = new();
    private readonly HttpClient _http;
    private readonly NotificationCounts _counts;
    private readonly SandboxOptions _options;
    private readonly Task _work;

    /// <summary>A renewed subscription goes on where the one it <paramref name="replaces"/> ends.</summary>
    public Feed(SubscriptionText text, HttpClient http, NotificationCounts counts, SandboxOptions options, Feed? replaces)
    {
        Text = text;
        (_http, _counts, _options) = (http, counts, options);
        _work = Task.Run(() => SendAll(replaces?._work ?? Task.CompletedTask));
    }

    public SubscriptionText Text { get; }

    public void Enqueue(StoredVersion version)
    {
        _counts.Queued();
        if (!_queue.Writer.TryWrite(version))
        {
            _counts.Done(delivered: false);
        }
    }

    /// <summary>Takes no more; what is queued is still sent.</summary>
    public void Finish() => _queue.Writer.TryComplete();

    /// <summary>Takes no more; what is queued is dropped.</summary>
    public void Stop()
    {
        Finish();
        _stop.Cancel();
    }

    public async ValueTask DisposeAsync()
    {
        Stop();
        await _work.ConfigureAwait(false);
        _stop.Dispose();
    }

    private async Task SendAll(Task before)
    {
        await before.ConfigureAwait(false);
        await foreach (var version in _queue.Reader.ReadAllAsync().ConfigureAwait(false))
        {
            _counts.Done(await Deliver(version).ConfigureAwait(false));
        }
    }

    private async Task<bool> Deliver(StoredVersion version)
    {
        var wait = _options.NotificationBackOff;
        for (var attempt = 1; !_stop.IsCancellationRequested; attempt++)
        {
            try
            {
                using var message = Message(version);
                using var response = await _http.SendAsync(message, _stop.Token).ConfigureAwait(false);
                if (response.IsSuccessStatusCode)
                {
                    return true;
                }
            }
            catch (Exception e) when (e is HttpRequestException or OperationCanceledException)
            {
                // The receiver is away or slow: that is what the attempts are for.
            }
            if (attempt >= _options.NotificationAttempts)
            {
                return false;
            }
            await Task.Delay(wait, _stop.Token).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            wait *= 2;
        }
        return false;
    }

    private HttpRequestMessage Message(StoredVersion version)
    {
        var endpoint = Text.Endpoint.AbsoluteUri.TrimEnd('/');
        var message = Text.WithPayload
            ? new HttpRequestMessage(HttpMethod.Put, $"{endpoint}/{version.Reference}") { Content = new ByteArrayContent(version.Json!) }
            : new HttpRequestMessage(HttpMethod.Post, Text.Endpoint) { Content = new ByteArrayContent([]) };
        if (Text.WithPayload)
        {
            message.Content!.Headers.ContentType = new MediaTypeHeaderValue("application/fhir+json", "utf-8");
        }
        foreach (var (name, value) in Text.Headers)
        {
            message.Headers.TryAddWithoutValidation(name, value);
        }
        return message;
    }
}
