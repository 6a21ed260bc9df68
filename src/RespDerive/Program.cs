using System.CommandLine;
using RespDerive.Commands;

namespace RespDerive;

/// <summary>The command line.</summary>
internal static class Program
{
    public static Task<int> Main(string[] args) => RunAsync(args, new InvocationConfiguration());

    /// <summary>Parses and runs; what is written goes to the writers of the configuration.</summary>
    internal static async Task<int> RunAsync(IReadOnlyList<string> args, InvocationConfiguration configuration)
    {
        var parsed = Root().Parse(args);
        var code = await parsed.InvokeAsync(configuration);
        return parsed.Errors.Count > 0 ? Exit.Usage : code;
    }

    private static RootCommand Root()
    {
        var root = new RootCommand("Derived respiratory values: computed once, correctly paired, with their evidence.\nA derived number is arithmetic on the values given; it is not a diagnosis, an alarm or an order.");
        root.Subcommands.Add(CatalogueCommand.Create());
        root.Subcommands.Add(ComputeCommand.Create());
        return root;
    }
}
