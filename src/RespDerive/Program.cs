using System.CommandLine;
using System.CommandLine.Invocation;
using RespDerive.Commands;
using RespDerive.Physiology;

namespace RespDerive;

/// <summary>The command line.</summary>
internal static class Program
{
    public static Task<int> Main(string[] args) => RunAsync(args, new InvocationConfiguration());

    /// <summary>Parses and runs; what is written goes to the writers of the configuration; the shipped catalogue unless another is given.</summary>
    internal static async Task<int> RunAsync(IReadOnlyList<string> args, InvocationConfiguration configuration, Catalogue? catalogue = null)
    {
        var parsed = Root(catalogue ?? Catalogue.Shipped).Parse(args);
        if (parsed.Action is not ParseErrorAction)
        {
            return await parsed.InvokeAsync(configuration);
        }

        foreach (var error in parsed.Errors)
        {
            await configuration.Error.WriteLineAsync(error.Message);
        }

        await configuration.Error.WriteLineAsync("See 'respderive --help'.");
        return Exit.Usage;
    }

    private static RootCommand Root(Catalogue catalogue)
    {
        var root = new RootCommand("Derived respiratory values: computed once, correctly paired, with their evidence.\nA derived number is arithmetic on the values given; it is not a diagnosis, an alarm or an order.");
        root.Subcommands.Add(CatalogueCommand.Create(catalogue));
        root.Subcommands.Add(CheckCommand.Create());
        root.Subcommands.Add(ComputeCommand.Create(catalogue));
        root.Subcommands.Add(DemoCommand.Create());
        root.Subcommands.Add(DeriveCommand.Create(catalogue));
        root.Subcommands.Add(DocsCommand.Create(catalogue));
        root.Subcommands.Add(ServeCommand.Create());
        Examples.Add(root, """
            Examples:
              respderive demo --seconds 60
              respderive catalogue
              respderive compute pf-ratio "pao2=90 mm[Hg]" fio2=0.40
              respderive compute --help
            """);
        return root;
    }
}
