using System.CommandLine;
using RespDerive.Physiology;

namespace RespDerive.Tests;

/// <summary>The command line, run in this process with captured streams.</summary>
internal static class Cli
{
    public static Task<(int Code, string Output, string Error)> RunAsync(params string[] args) => RunAsync(Catalogue.Shipped, args);

    /// <summary>With the definitions of another catalogue.</summary>
    public static async Task<(int Code, string Output, string Error)> RunAsync(Catalogue catalogue, params string[] args)
    {
        using var output = new StringWriter();
        using var error = new StringWriter();
        var code = await Program.RunAsync(args, new InvocationConfiguration { Output = output, Error = error }, catalogue);
        return (code, output.ToString(), error.ToString());
    }
}
