using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using RespDerive.Sandbox;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>A FHIR endpoint in memory and the service beside it, in this process, speaking HTTP with each other.</summary>
internal sealed class Bench : IAsyncDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("respderive-bench-");
    private readonly Dictionary<string, string?> _settings;
    private WebApplication? _service;

    private Bench(SandboxServer sandbox, Dictionary<string, string?> settings)
    {
        (Sandbox, _settings) = (sandbox, settings);
        Address = $"http://127.0.0.1:{Ports.Free()}";
        Fhir = new FhirClient(sandbox.BaseUrl);
    }

    public SandboxServer Sandbox { get; }

    /// <summary>The endpoint as another system sees it.</summary>
    public FhirClient Fhir { get; }

    /// <summary>Where the service listens.</summary>
    public string Address { get; }

    public HttpClient Http { get; } = new();

    public Store Store => _service!.Services.GetRequiredService<Store>();

    /// <summary>Starts both. Settings are keys below <c>RespDerive:</c>; intake is by Subscription with payload unless they say otherwise.</summary>
    public static async Task<Bench> StartAsync(params (string Key, string? Value)[] settings)
    {
        var bench = new Bench(await SandboxServer.StartAsync(new SandboxOptions(), TestContext.Current.CancellationToken), settings.ToDictionary(one => one.Key, one => one.Value));
        await bench.StartServiceAsync();
        return bench;
    }

    /// <summary>Polls twenty times a second and does not subscribe.</summary>
    public static (string, string?)[] Polling => [("Intake:Subscribe", "false"), ("Intake:PollEvery", "00:00:00.2")];

    /// <summary>Neither subscribes nor polls again after the first time.</summary>
    public static (string, string?)[] Silent => [("Intake:Subscribe", "false"), ("Intake:PollEvery", "01:00:00")];

    public async Task StartServiceAsync()
    {
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions { Args = [], ContentRootPath = _folder.FullName });
        builder.Configuration.Sources.Clear();
        builder.Configuration.AddInMemoryCollection(Settings());
        var service = ServiceHost.Build(builder);
        await ServiceHost.StartAsync(service, TestContext.Current.CancellationToken);
        _service = service;
        if (Settings()["RespDerive:Intake:Subscribe"] == "true")
        {
            await Until.True(() => ServiceHost.IsSubscribed(service), "subscriptions");
        }
    }

    public async Task StopServiceAsync()
    {
        if (_service is { } service)
        {
            _service = null;
            await service.StopAsync();
            await service.DisposeAsync();
        }
    }

    /// <summary>Deletes the store, as when its disk is lost; only while the service is stopped.</summary>
    public void ForgetStore()
    {
        foreach (var file in _folder.GetFiles("bench.db*"))
        {
            file.Delete();
        }
    }

    public Task<HttpResponseMessage> NotifyAsync(HttpMethod method, string path, HttpContent? content = null, string? authorization = null)
    {
        var request = new HttpRequestMessage(method, $"{Address}/notify{path}") { Content = content };
        if (authorization is not null)
        {
            request.Headers.TryAddWithoutValidation("Authorization", authorization);
        }

        return Http.SendAsync(request, TestContext.Current.CancellationToken);
    }

    /// <summary>The one result of a definition that meets a condition, waited for; in vain, the test says what the service thinks.</summary>
    public Task<JsonObject> ResultAsync(string patient, string definition, Func<JsonObject, bool> condition) => Fhir.ResultAsync(patient, definition, condition, Thoughts);

    public string Thoughts() => string.Join('\n', [
        Store.Counts().ToString(),
        .. Store.Outcomes(new OutcomeFilter()).Select(one => $"{one.Current?.Definition} {one.Current?.Value} {one.Current?.Withheld} tries {one.Tries} parked {one.Parked} {one.ParkedText} wanted {one.Wanted} delivered {one.Delivered}"),
        CapturedLogs.Text]);

    /// <summary>Waits until nothing is under way: no notification, unread resource, fetch or delivery.</summary>
    public async Task IdleAsync()
    {
        await Sandbox.Notifications.QuietAsync(TestContext.Current.CancellationToken);
        await Until.True(() => Store.OldestOpen() is null && Store.CountFetches() == 0 && Store.OldestPending() is null, "nothing under way");
        await Sandbox.Notifications.QuietAsync(TestContext.Current.CancellationToken);
    }

    public async ValueTask DisposeAsync()
    {
        await StopServiceAsync();
        await Sandbox.DisposeAsync();
        Fhir.Dispose();
        Http.Dispose();
        _folder.Delete(recursive: true);
    }

    private Dictionary<string, string?> Settings()
    {
        var all = new Dictionary<string, string?>
        {
            ["urls"] = Address,
            ["RespDerive:Site"] = "bench",
            ["RespDerive:Store"] = Path.Combine(_folder.FullName, "bench.db"),
            ["RespDerive:Source:Address"] = Sandbox.BaseUrl,
            ["RespDerive:Intake:Subscribe"] = "true",
            ["RespDerive:Intake:Endpoint"] = Address + "/notify",
            ["RespDerive:Intake:PollEvery"] = "01:00:00",
            ["RespDerive:Delivery:On"] = "true",
            ["RespDerive:Delivery:PublishHistory"] = "true",
            ["RespDerive:Delivery:LongestBackOff"] = "00:00:01",
        };
        foreach (var (key, value) in _settings)
        {
            all["RespDerive:" + key] = value;
        }

        return all;
    }
}
