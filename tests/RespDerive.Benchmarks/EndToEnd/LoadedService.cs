using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.Hosting;
using RespDerive.Sandbox;
using RespDerive.Service;
using RespDerive.Service.Operations;
using RespDerive.Storage;

namespace RespDerive.Benchmarks.EndToEnd;

/// <summary>The whole service on a store of its own, with an endpoint that holds the standing resources and takes the results.</summary>
internal sealed class LoadedService : IAsyncDisposable
{
    private readonly DirectoryInfo _folder;
    private readonly SandboxServer _sandbox;
    private readonly WebApplication _service;
    private readonly bool _delivers;
    private int _turns;

    private LoadedService(DirectoryInfo folder, SandboxServer sandbox, WebApplication service, string address, bool delivers)
    {
        (_folder, _sandbox, _service, Address, _delivers) = (folder, sandbox, service, address + "/notify", delivers);
        _service.Services.GetRequiredService<Feed>().OnTurn += _ => Interlocked.Increment(ref _turns);
    }

    /// <summary>Where notifications go.</summary>
    public string Address { get; }

    /// <summary>Base of the endpoint.</summary>
    public string Endpoint => _sandbox.BaseUrl;

    /// <summary>Turns committed.</summary>
    public int Turns => _turns;

    public Counts Counts => Store.Counts();

    private Store Store => _service.Services.GetRequiredService<Store>();

    public static async Task<LoadedService> StartAsync(bool delivers)
    {
        var folder = Directory.CreateTempSubdirectory("respderive-bench-");
        var sandbox = await SandboxServer.StartAsync(new SandboxOptions());
        var address = $"http://127.0.0.1:{Ports.Free()}";
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions { Args = [], ContentRootPath = folder.FullName });
        builder.Configuration.Sources.Clear();
        builder.Configuration.AddInMemoryCollection(new Dictionary<string, string?>
        {
            ["Serilog:MinimumLevel:Default"] = "Warning",
            ["Serilog:MinimumLevel:Override:Microsoft.Hosting.Lifetime"] = "Warning",
            ["RespDerive:Site"] = "ward-alder",
            ["RespDerive:Store"] = Path.Combine(folder.FullName, "respderive.db"),
            ["RespDerive:Source:Address"] = sandbox.BaseUrl,
            ["RespDerive:Intake:PollEvery"] = "1.00:00:00",
            ["RespDerive:Delivery:On"] = delivers ? "true" : "false",
            ["RespDerive:Delivery:PublishHistory"] = "true",
        });
        builder.WebHost.UseSetting("urls", address);
        var service = ServiceHost.Build(builder, Ward.Policies);
        await ServiceHost.StartAsync(service);
        return new LoadedService(folder, sandbox, service, address, delivers);
    }

    /// <summary>Until everything is derived, and delivered where that is on. False when the limit came first.</summary>
    public async Task<bool> IdleAsync(TimeSpan limit)
    {
        using var end = new CancellationTokenSource(limit);
        try
        {
            while (Store.OldestOpen() is not null || (_delivers && Store.OldestPending() is not null))
            {
                await Task.Delay(20, end.Token);
            }

            return true;
        }
        catch (OperationCanceledException)
        {
            return false;
        }
    }

    public async ValueTask DisposeAsync()
    {
        await _service.StopAsync();
        await _service.DisposeAsync();
        await _sandbox.DisposeAsync();
        _folder.Delete(recursive: true);
    }
}
