using System.Net;
using Microsoft.AspNetCore.Builder;
using Microsoft.AspNetCore.Hosting;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.DependencyInjection;
using Microsoft.Extensions.DependencyInjection.Extensions;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;
using Microsoft.Extensions.Options;
using Orleans.Configuration;
using Orleans.Hosting;
using RespDerive.Physiology;
using RespDerive.Service.Delivery;
using RespDerive.Service.Intake;
using RespDerive.Service.Operations;
using RespDerive.Service.Patients;
using RespDerive.Storage;
using RespDerive.Timeline;
using Serilog;
using Serilog.Events;
using Serilog.Formatting.Compact;

namespace RespDerive.Service;

/// <summary>Builds the service: store, site, intake, patients, delivery, operations.</summary>
public static class ServiceHost
{
    /// <summary>The web application, not yet started.</summary>
    /// <param name="builder">Configuration as the caller wants it.</param>
    /// <param name="policies">Policies in place of the file the options name.</param>
    /// <exception cref="OptionsValidationException">All errors of the configuration.</exception>
    /// <exception cref="SiteException">All errors of the site's files.</exception>
    /// <exception cref="StoreException">The store cannot be used.</exception>
    public static WebApplication Build(WebApplicationBuilder builder, PolicyBook? policies = null)
    {
        ArgumentNullException.ThrowIfNull(builder);
        var options = Options(builder.Configuration);
        AddLogs(builder);
        builder.WebHost.ConfigureKestrel(kestrel => kestrel.Limits.MaxRequestBodySize = options.Intake.LargestNotification);
        var services = builder.Services;
        services.AddSingleton(Microsoft.Extensions.Options.Options.Create(options));
        services.TryAddSingleton(TimeProvider.System);
        services.AddSingleton<Feed>();
        var site = new Site(options, Catalogue.Shipped, policies);
        services.AddSingleton(site);
        var store = Store.Open(Path.GetFullPath(options.Store), site.KindOf);
        services.AddSingleton(_ => store); // by a factory, so that the container closes it
        AddIntake(services);
        services.AddSingleton<PatientTurn>();
        services.AddSingleton<Target>();
        services.AddSingleton<Testimony>();
        services.AddSingleton<Copies>();
        services.AddSingleton<Recovery>();
        services.AddSingleton<Postman>();
        Run<Sweeper>(services);
        Run<Sender>(services);
        AddEngine(builder);

        var app = builder.Build();
        Health.Map(app);
        Webhook.Map(app);
        app.Lifetime.ApplicationStarted.Register(() => _ = StopWithStoreAsync(app));
        return app;
    }

    /// <summary>Starts the application; its first start is remembered before anything is read.</summary>
    public static async Task StartAsync(WebApplication app, CancellationToken cancel = default)
    {
        ArgumentNullException.ThrowIfNull(app);
        await FirstStart.RememberAsync(app.Services.GetRequiredService<Store>(), app.Services.GetRequiredService<TimeProvider>().GetUtcNow());
        await app.StartAsync(cancel);
    }

    /// <summary>True once every criterion has its subscription at the source.</summary>
    public static bool IsSubscribed(WebApplication app)
    {
        ArgumentNullException.ThrowIfNull(app);
        return app.Services.GetRequiredService<SubscriptionKeeper>().Kept;
    }

    /// <summary>The options, checked.</summary>
    /// <exception cref="OptionsValidationException">All errors, also of unknown keys.</exception>
    public static ServiceOptions Options(IConfiguration configuration)
    {
        ArgumentNullException.ThrowIfNull(configuration);
        var section = configuration.GetSection("RespDerive");
        var options = new ServiceOptions();
        var bound = Binding(() => section.Bind(options));

        // Apart, since an unknown key stops the binding of what comes after it.
        var unknown = Binding(() => section.Bind(new ServiceOptions(), binder => binder.ErrorOnUnknownConfiguration = true));
        string[] errors = bound is not null ? [bound, .. unknown is null || unknown == bound ? [] : new[] { unknown }]
            : [.. unknown is null ? [] : new[] { unknown }, .. OptionsCheck.Errors(options)];
        return errors.Length == 0 ? options : throw new OptionsValidationException("RespDerive", typeof(ServiceOptions), errors);
    }

    private static string? Binding(Action bind)
    {
        try
        {
            bind();
            return null;
        }
        catch (InvalidOperationException exception)
        {
            return exception.Message;
        }
    }

    /// <summary>No request log: paths and queries name patients. HTTP clients are our own and log nothing.</summary>
    private static void AddLogs(WebApplicationBuilder builder)
    {
        builder.Services.AddSerilog((_, log) => log
            .MinimumLevel.Information()
            .MinimumLevel.Override("Microsoft", LogEventLevel.Warning)
            .MinimumLevel.Override("Microsoft.Hosting.Lifetime", LogEventLevel.Information)
            .MinimumLevel.Override("Orleans", LogEventLevel.Error)
            .MinimumLevel.Override("Polly", LogEventLevel.Error)
            .ReadFrom.Configuration(builder.Configuration)
            .WriteTo.Console(new CompactJsonFormatter(), standardErrorFromLevel: LogEventLevel.Verbose));
    }

    private static void AddIntake(IServiceCollection services)
    {
        services.AddSingleton<SourceServer>();
        services.AddSingleton<Ingest>();
        services.AddSingleton<Searches>();
        services.AddSingleton<Disappearances>();
        services.AddSingleton<Webhook>();
        services.AddSingleton(provider => new Lazy<Ingest>(provider.GetRequiredService<Ingest>));
        services.AddSingleton(provider => new Lazy<Searches>(provider.GetRequiredService<Searches>));
        Run<Awaited>(services);
        Run<Poller>(services);
        Run<SubscriptionKeeper>(services);
    }

    private static void Run<T>(IServiceCollection services) where T : class, IHostedService
    {
        services.AddSingleton<T>();
        services.AddHostedService(provider => provider.GetRequiredService<T>());
    }

    /// <summary>Patients' workers in this one process; nothing outside is needed.</summary>
    private static void AddEngine(WebApplicationBuilder builder) => builder.UseOrleans(silo =>
    {
        var (siloPort, gatewayPort) = (Ports.Free(), Ports.Free());
        silo.UseLocalhostClustering(siloPort, gatewayPort, new IPEndPoint(IPAddress.Loopback, siloPort), "respderive", "respderive");
        silo.Configure<GrainCollectionOptions>(collection => collection.CollectionAge = TimeSpan.FromMinutes(10));
    });

    /// <summary>A store that failed can keep nothing, so the process ends and its supervisor starts it anew.</summary>
    private static async Task StopWithStoreAsync(WebApplication app)
    {
        var failure = await app.Services.GetRequiredService<Store>().WhenFailed;
        app.Logger.LogCritical("The store has failed ({Code}); the service stops", failure.Code);
        await app.StopAsync();
    }
}
