using System.Text.Json.Nodes;
using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.DependencyInjection;
using RespDerive.Storage;

namespace RespDerive.Service.Tests;

/// <summary>The service beside a server that a test plays; it posts nothing, and its clock can be set forward.</summary>
internal sealed class Alone : IAsyncDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("respderive-alone-");
    private readonly Dictionary<string, string?> _settings;
    private readonly HttpClient _http = new();
    private readonly string _address = $"http://127.0.0.1:{Ports.Free()}";
    private WebApplication? _service;

    private Alone(OddServer server, (string Key, string? Value)[] settings)
    {
        Server = server;
        _settings = new()
        {
            ["urls"] = _address,
            ["RespDerive:Store"] = StorePath,
            ["RespDerive:Source:Address"] = server.BaseUrl,
            ["RespDerive:Intake:Endpoint"] = _address + "/notify",
            ["RespDerive:Intake:PollEvery"] = "01:00:00",
            ["RespDerive:Intake:Criteria:0"] = "Observation?",
        };
        foreach (var (key, value) in settings)
        {
            _settings["RespDerive:" + key] = value;
        }
    }

    public OddServer Server { get; }

    public ForwardClock Clock { get; } = new();

    public string StorePath => Path.Combine(_folder.FullName, "alone.db");

    public Store Store => Get<Store>();

    /// <summary>What the service consists of.</summary>
    public T Get<T>() where T : notnull => _service!.Services.GetRequiredService<T>();

    public static async Task<Alone> StartAsync(OddServer server, params (string Key, string? Value)[] settings)
    {
        var alone = new Alone(server, settings);
        await alone.StartServiceAsync();
        return alone;
    }

    public async Task StartServiceAsync()
    {
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions { Args = [], ContentRootPath = _folder.FullName });
        builder.Configuration.Sources.Clear();
        builder.Configuration.AddInMemoryCollection(_settings);
        builder.Services.AddSingleton<TimeProvider>(Clock);
        _service = ServiceHost.Build(builder);
        await ServiceHost.StartAsync(_service, TestContext.Current.CancellationToken);
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

    /// <summary>Tells the service of resources, as a subscription with payload does.</summary>
    public async Task TellAsync(params JsonObject[] resources)
    {
        foreach (var resource in resources)
        {
            using var content = FhirClient.Content(resource);
            using var answer = await _http.PutAsync($"{_address}/notify/{resource["resourceType"]}/{resource["id"]}", content, TestContext.Current.CancellationToken);
            answer.EnsureSuccessStatusCode();
        }
    }

    /// <summary>Tells the service that something was deleted.</summary>
    public async Task TellDeletedAsync(string reference)
    {
        using var answer = await _http.DeleteAsync($"{_address}/notify/{reference}", TestContext.Current.CancellationToken);
        answer.EnsureSuccessStatusCode();
    }

    public Task<string> ReadyAsync() => _http.GetStringAsync(_address + "/health/ready", TestContext.Current.CancellationToken);

    /// <summary>Waits until everything journalled was read.</summary>
    public Task SettledAsync() => Until.True(() => Store.OldestOpen() is null, "everything read");

    /// <summary>The value of the one result; null when there is none.</summary>
    public double? Ratio() => Store.Outcomes(new OutcomeFilter { Definition = "pf-ratio", Withheld = false }) is [var only] ? only.Current?.Value : null;

    public async ValueTask DisposeAsync()
    {
        await StopServiceAsync();
        _http.Dispose();
        _folder.Delete(recursive: true);
    }
}

/// <summary>The time of day, set forward; waits last as long as they do.</summary>
internal sealed class ForwardClock : TimeProvider
{
    private long _ahead;

    public void Forward(TimeSpan by) => Interlocked.Add(ref _ahead, by.Ticks);

    public override DateTimeOffset GetUtcNow() => System.GetUtcNow() + new TimeSpan(Interlocked.Read(ref _ahead));
}
