using System.CommandLine;
using System.CommandLine.Invocation;
using System.Text.Json.Nodes;
using Microsoft.Extensions.Options;
using RespDerive.Physiology;
using RespDerive.Service;

namespace RespDerive.Commands;

/// <summary><c>check config</c>: every error of the configuration and of the site's files, by the code that <c>serve</c> runs.</summary>
internal static class CheckCommand
{
    public static Command Create()
    {
        var config = ServeCommand.ConfigOption();
        var output = OutputOption.Create();
        var one = new Command("config", "Checks configuration, policy, code map and mode map, and names every error.") { config, output };
        Examples.Add(one, """
            Example:
              respderive check config --config site.json

            Exit codes: 0 in order, 2 errors.
            """);
        one.SetAction(parsed => Run(parsed.GetValue(config), parsed.GetValue(output) == "json", parsed.InvocationConfiguration));
        return new Command("check", "Checks before running.") { one };
    }

    private static int Run(string? config, bool json, InvocationConfiguration streams)
    {
        var errors = Errors(config);
        if (json)
        {
            streams.Output.WriteLine(OutputOption.Line(new JsonObject { ["errors"] = new JsonArray([.. errors.Select(error => (JsonNode)error)]) }));
        }
        else if (errors.Count == 0)
        {
            streams.Output.WriteLine("The configuration is in order.");
        }
        else
        {
            foreach (var error in errors)
            {
                streams.Error.WriteLine(error);
            }
        }

        return errors.Count == 0 ? Exit.Ok : Exit.Usage;
    }

    private static IReadOnlyList<string> Errors(string? config)
    {
        try
        {
            _ = new Site(ServiceHost.Options(ServeCommand.Builder(config).Configuration), Catalogue.Shipped);
            return [];
        }
        catch (OptionsValidationException exception)
        {
            return [.. exception.Failures];
        }
        catch (SiteException exception)
        {
            return exception.Errors;
        }
        catch (FileNotFoundException exception)
        {
            return [$"There is no file {exception.FileName}."];
        }
    }
}
