using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using RespDerive.Fhir.Writing;
using RespDerive.Sandbox;
using RespDerive.Sandbox.Patients;
using RespDerive.Service;
using RespDerive.Service.Operations;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Demo;

/// <summary>The demo: three parts that speak only HTTP with each other, in one process.</summary>
internal sealed class DemoRun : IAsyncDisposable
{
    /// <summary>Pressure at the invented ward, which lies near sea level.</summary>
    private const double Barometer = 752;

    private static readonly TimeSpan Longest = TimeSpan.FromHours(24);
    private static readonly TimeSpan Drain = TimeSpan.FromSeconds(20);
    private readonly DirectoryInfo _folder;
    private readonly SandboxServer _sandbox;
    private readonly WebApplication _service;
    private readonly Screen _screen;
    private readonly WardOptions _ward;
    private readonly int? _seconds;

    private DemoRun(DirectoryInfo folder, SandboxServer sandbox, WebApplication service, Screen screen, int seed, int? seconds)
    {
        (_folder, _sandbox, _service, _screen, _seconds) = (folder, sandbox, service, screen, seconds);
        _ward = new WardOptions
        {
            Seed = seed,
            Live = seconds is { } limit ? TimeSpan.FromMinutes(Math.Min(limit, Longest.TotalMinutes)) : Longest,
            Filed = screen.CameIn,
        };
    }

    public Counts Counts => Store.Counts();

    private Store Store => _service.Services.GetRequiredService<Store>();

    public static async Task<DemoRun> StartAsync(Screen screen, int seed, int? seconds, CancellationToken cancel)
    {
        var folder = Directory.CreateTempSubdirectory("respderive-demo-");
        var sandbox = await SandboxServer.StartAsync(new SandboxOptions(), cancel);
        var address = $"http://127.0.0.1:{Ports.Free()}";
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions { Args = [], ContentRootPath = folder.FullName });
        builder.Configuration.Sources.Clear();
        builder.Configuration.AddInMemoryCollection(new Dictionary<string, string?>
        {
            ["urls"] = address,
            ["Serilog:MinimumLevel:Default"] = "Warning",
            ["Serilog:MinimumLevel:Override:Microsoft.Hosting.Lifetime"] = "Warning",
            ["RespDerive:Site"] = "ward-alder",
            ["RespDerive:Store"] = Path.Combine(folder.FullName, "respderive.db"),
            ["RespDerive:Source:Address"] = sandbox.BaseUrl,
            ["RespDerive:Intake:Subscribe"] = "true",
            ["RespDerive:Intake:Endpoint"] = address + "/notify",
            ["RespDerive:Delivery:On"] = "true",
            ["RespDerive:Delivery:PublishHistory"] = "true",
        });
        builder.WebHost.UseSetting("urls", address);
        var service = ServiceHost.Build(builder, new PolicyBook(PolicyDocument.WithHash(new Policy { PressureMmHg = Barometer })));
        var feed = service.Services.GetRequiredService<Feed>();
        feed.OnTurn += screen.Turned;
        feed.OnDelivered += screen.Delivered;
        feed.OnParked += screen.Parked;
        await ServiceHost.StartAsync(service, cancel);
        screen.Start(sandbox.BaseUrl, address, folder.FullName);
        return new DemoRun(folder, sandbox, service, screen, seed, seconds);
    }

    /// <summary>Plays the ward until the time is up or somebody stops it, then lets what is under way arrive.</summary>
    public async Task PlayAsync(CancellationToken cancel)
    {
        await SubscribedAsync(cancel);
        using var end = CancellationTokenSource.CreateLinkedTokenSource(cancel);
        if (_seconds is { } seconds)
        {
            end.CancelAfter(TimeSpan.FromSeconds(seconds));
        }

        try
        {
            await SimulatedWard.RunAsync(_sandbox.BaseUrl, _ward, end.Token);
            await Task.Delay(Timeout.Infinite, end.Token);
        }
        catch (OperationCanceledException) when (end.IsCancellationRequested)
        {
            // The end of the play.
        }

        await DrainedAsync();
    }

    public async ValueTask DisposeAsync()
    {
        await _service.StopAsync();
        await _service.DisposeAsync();
        await _sandbox.DisposeAsync();
        _folder.Delete(recursive: true);
    }

    private async Task SubscribedAsync(CancellationToken cancel)
    {
        while (!SubscriptionsAreKept())
        {
            await Task.Delay(50, cancel);
        }
    }

    private bool SubscriptionsAreKept() => ServiceHost.IsSubscribed(_service);

    private async Task DrainedAsync()
    {
        using var limit = new CancellationTokenSource(Drain);
        try
        {
            await _sandbox.Notifications.QuietAsync(limit.Token);
            while (Store.OldestOpen() is not null || Store.OldestPending() is not null)
            {
                await Task.Delay(100, limit.Token);
            }
        }
        catch (OperationCanceledException)
        {
            // What is still under way is told as pending.
        }
    }
}
