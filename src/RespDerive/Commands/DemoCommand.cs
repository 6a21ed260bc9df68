using System.CommandLine;
using System.CommandLine.Invocation;
using System.Text.Json.Nodes;
using RespDerive.Demo;
using RespDerive.Storage;

namespace RespDerive.Commands;

/// <summary><c>demo</c>: sandbox endpoint, simulated patients and the service in one process.</summary>
internal static class DemoCommand
{
    private const string Help = """
        Everything is invented: the ward, its patients and their numbers. Nothing is left behind.

        Examples:
          respderive demo
          respderive demo --seconds 60 --output json

        Exit codes: 0 ended, 3 it could not start.
        """;

    public static Command Create()
    {
        var seconds = new Option<int?>("--seconds") { Description = "End by itself after this time, with a summary; otherwise with Ctrl+C.", HelpName = "N" };
        var seed = new Option<int>("--seed") { Description = "Another seed plays other patients.", DefaultValueFactory = _ => 1, HelpName = "N" };
        var output = OutputOption.Create();
        var command = new Command("demo", "Shows the whole path on simulated patients; needs no set-up.") { seconds, seed, output };
        command.Validators.Add(result =>
        {
            if (result.GetValue(seconds) is < 1 or > 86400)
            {
                result.AddError("--seconds must be 1 to 86400.");
            }
        });
        Examples.Add(command, Help);
        command.SetAction((parsed, cancel) => RunAsync(parsed.GetValue(seconds), parsed.GetValue(seed), parsed.GetValue(output) == "json", parsed.InvocationConfiguration, cancel));
        return command;
    }

    private static async Task<int> RunAsync(int? seconds, int seed, bool json, InvocationConfiguration streams, CancellationToken cancel)
    {
        // Machine-readable output keeps standard output for the summary alone.
        var screen = new Screen(json ? streams.Error : streams.Output);
        await using var demo = await DemoRun.StartAsync(screen, seed, seconds, cancel);
        await demo.PlayAsync(cancel);
        var counts = demo.Counts;
        if (json)
        {
            await streams.Output.WriteLineAsync(OutputOption.Line(Summary(counts)));
        }
        else
        {
            screen.Line("");
            screen.Line(string.Join(" · ", Summary(counts).Select(pair => $"{pair.Value} {pair.Key}")));
        }

        return Exit.Ok;
    }

    private static JsonObject Summary(Counts counts) => new()
    {
        ["received"] = counts.Received,
        ["readings"] = counts.Readings,
        ["results"] = counts.Results,
        ["revisions"] = counts.Revisions,
        ["retractions"] = counts.Retractions,
        ["withheld"] = counts.Withheld,
        ["delivered"] = counts.Delivered,
        ["refused"] = counts.Refused,
        ["pending"] = counts.Pending,
    };
}
