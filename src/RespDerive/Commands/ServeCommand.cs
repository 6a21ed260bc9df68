using System.CommandLine;
using System.CommandLine.Invocation;
using Microsoft.AspNetCore.Builder;
using Microsoft.Extensions.Configuration;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Options;
using RespDerive.Service;
using RespDerive.Storage;

namespace RespDerive.Commands;

/// <summary><c>serve</c>: the service.</summary>
internal static class ServeCommand
{
    private const string Help = """
        Configuration: appsettings.json in the working folder, then --config FILE, then the environment
        (RespDerive__Source__Address=https://ehr.example/fhir and so on). Results are posted only with
        RespDerive__Delivery__On=true; without it everything is computed and kept, and nothing leaves.

        Example:
          RespDerive__Source__Address=http://127.0.0.1:8081/fhir respderive serve --urls http://127.0.0.1:8080

        Exit codes: 0 stopped, 2 configuration, 3 the store cannot be used.
        """;

    public static Command Create()
    {
        var config = ConfigOption();
        var urls = new Option<string?>("--urls") { Description = "Addresses to listen on; ASPNETCORE_URLS otherwise.", HelpName = "URL[;URL]" };
        var command = new Command("serve", "Runs the service: reads a FHIR server, derives, and posts results back.") { config, urls };
        Examples.Add(command, Help);
        command.SetAction((parsed, cancel) => RunAsync(parsed.GetValue(config), parsed.GetValue(urls), parsed.InvocationConfiguration, cancel));
        return command;
    }

    internal static Option<string?> ConfigOption() => new("--config") { Description = "A further configuration file (JSON).", HelpName = "FILE" };

    /// <summary>Configuration as every command of the service reads it.</summary>
    internal static WebApplicationBuilder Builder(string? config)
    {
        var builder = WebApplication.CreateBuilder(new WebApplicationOptions { Args = [] });
        if (config is not null)
        {
            builder.Configuration.AddJsonFile(Path.GetFullPath(config), optional: false);
            builder.Configuration.AddEnvironmentVariables();
        }

        return builder;
    }

    private static async Task<int> RunAsync(string? config, string? urls, InvocationConfiguration streams, CancellationToken cancel)
    {
        WebApplication app;
        try
        {
            var builder = Builder(config);
            if (urls is not null)
            {
                builder.WebHost.UseSetting("urls", urls);
            }

            app = ServiceHost.Build(builder);
        }
        catch (OptionsValidationException exception)
        {
            return await FailAsync(streams, exception.Failures, Exit.Usage);
        }
        catch (SiteException exception)
        {
            return await FailAsync(streams, exception.Errors, Exit.Usage);
        }
        catch (FileNotFoundException exception)
        {
            return await FailAsync(streams, [$"There is no file {exception.FileName}."], Exit.Usage);
        }
        catch (StoreException exception)
        {
            return await FailAsync(streams, [$"{exception.Code}: {exception.Message}"], Exit.Environment);
        }

        await using (app)
        {
            await ServiceHost.StartAsync(app, cancel);
            await app.WaitForShutdownAsync(cancel);
            return Exit.Ok;
        }
    }

    private static async Task<int> FailAsync(InvocationConfiguration streams, IEnumerable<string> errors, int code)
    {
        foreach (var error in errors)
        {
            await streams.Error.WriteLineAsync(error);
        }

        return code;
    }
}
