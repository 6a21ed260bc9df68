using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.AspNetCore.Http;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;
using RespDerive.Sandbox.Endpoint;
using RespDerive.Sandbox.Notifications;

namespace RespDerive.Sandbox;

/// <summary>
/// An in-memory FHIR R4 endpoint on 127.0.0.1 for demonstrations and tests: no authentication, nothing is kept
/// after it stops. Never put patient data in it.
/// </summary>
public sealed class SandboxServer : IAsyncDisposable
{
    private const string Base = "/fhir";
    private readonly WebApplication _app;
    private readonly SandboxOptions _options;
    private readonly TaskCompletionSource _assembled = new(TaskCreationOptions.RunContinuationsAsynchronously);
    private ResourceStore _store = null!;
    private Feeds _feeds = null!;
    private Router _router = null!;
    private Bundles _bundles = null!;

    private SandboxServer(WebApplication app, SandboxOptions options) => (_app, _options) = (app, options);

    /// <summary>The FHIR base, for example <c>http://127.0.0.1:43211/fhir</c>; no slash at the end.</summary>
    public string BaseUrl { get; private set; } = "";

    /// <summary>Faults to switch on and off while it runs.</summary>
    public Faults Faults { get; } = new();

    /// <summary>What happened so far.</summary>
    public Journal Journal { get; } = new();

    /// <summary>What became of the notifications.</summary>
    public NotificationCounts Notifications => _feeds.Counts;

    /// <summary>Starts a server; throws <see cref="IOException"/> when the port is taken.</summary>
    public static async Task<SandboxServer> StartAsync(SandboxOptions options, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(options);
        var builder = WebApplication.CreateSlimBuilder();
        builder.Logging.ClearProviders();
        builder.Services.AddSingleton<IHostLifetime, EmbeddedLifetime>();
        builder.WebHost.ConfigureKestrel(kestrel =>
        {
            kestrel.Listen(System.Net.IPAddress.Loopback, options.Port);
            kestrel.Limits.MaxRequestBodySize = 64 * 1024 * 1024;
            kestrel.AddServerHeader = false;
        });
        var app = builder.Build();
        var server = new SandboxServer(app, options);
        app.Run(server.Serve);
        await app.StartAsync(cancel).ConfigureAwait(false);
        server.Assemble(new Uri(app.Urls.First()).GetLeftPart(UriPartial.Authority) + Base);
        return server;
    }

    /// <summary>Stops at once; queued notifications are dropped.</summary>
    public async ValueTask DisposeAsync()
    {
        await _app.StopAsync(new CancellationToken(true)).ConfigureAwait(false);
        await _feeds.DisposeAsync().ConfigureAwait(false);
        await _app.DisposeAsync().ConfigureAwait(false);
    }

    private void Assemble(string baseUrl)
    {
        BaseUrl = baseUrl;
        _store = new ResourceStore(_options.Clock, Faults);
        _feeds = new Feeds(_store, Faults, _options, baseUrl);
        _store.Committed = _feeds.Follow;
        var writing = new Writing(_store, Faults, _options.Validate, baseUrl);
        _router = new Router(new Reading(_store, baseUrl), writing, new Searching(_store, _options, baseUrl), () => Capability.Statement(baseUrl, _options.Clock.GetUtcNow()));
        _bundles = new Bundles(_router, writing, _store, (request, answer) => Record(request, answer, answer.Status), baseUrl);
        _assembled.SetResult();
    }

    private async Task Serve(HttpContext http)
    {
        // The base is known only once the port is; a request may come between.
        await _assembled.Task.ConfigureAwait(false);
        if (!http.Request.Path.StartsWithSegments(Base, out var rest))
        {
            await HttpAnswer.Send(http, FhirAnswer.Error(404, "not-found", $"the FHIR base is {BaseUrl}"), null).ConfigureAwait(false);
            return;
        }
        if (Faults.Delay is { Ticks: > 0 } delay)
        {
            await Task.Delay(delay, http.RequestAborted).ConfigureAwait(false);
        }
        var request = await HttpAnswer.Receive(http, rest).ConfigureAwait(false);
        if (Faults.TakeFailure(request.Method) is var (status, retryAfter))
        {
            var failure = FhirAnswer.Error(status, status == 429 ? "throttled" : "transient", "a fault switched on by the test");
            Record(request, failure, status);
            await HttpAnswer.Send(http, failure, request, retryAfter).ConfigureAwait(false);
            return;
        }
        var answer = Answer(request);
        var lost = request.Method is not "GET" && !request.Path.EndsWith("_search", StringComparison.Ordinal) && answer.Status < 400 && Faults.TakeLostResponse();
        Record(request, answer, lost ? 0 : answer.Status);
        if (lost)
        {
            http.Abort();
            return;
        }
        await HttpAnswer.Send(http, answer, request).ConfigureAwait(false);
    }

    private FhirAnswer Answer(FhirRequest request)
    {
        if (request is not { Method: "POST", Segments: [] })
        {
            return _router.Answer(request);
        }
        try
        {
            return _bundles.Process(request);
        }
        catch (Refusal refusal)
        {
            return FhirAnswer.Error(refusal);
        }
        catch (InvalidOperationException)
        {
            return FhirAnswer.Error(Router.WrongKind);
        }
    }

    private void Record(FhirRequest request, FhirAnswer answer, int status)
    {
        var path = request.Segments;
        var type = path.Length > 0 && ResourceRules.IsType(path[0]) ? path[0] : null;
        var id = answer.About?.Id ?? (path.Length > 1 && path[1] != "_search" ? path[1] : null);
        Journal.Add(new JournalEntry(_options.Clock.GetUtcNow(), request.Method, request.Path + request.Query, type, id, answer.About?.Version, status));
    }

    /// <summary>The endpoint lives inside another program, which alone listens to signals.</summary>
    private sealed class EmbeddedLifetime : IHostLifetime
    {
        public Task WaitForStartAsync(CancellationToken cancellationToken) => Task.CompletedTask;

        public Task StopAsync(CancellationToken cancellationToken) => Task.CompletedTask;
    }
}
