using System.CommandLine;
using System.CommandLine.Invocation;
using RespDerive.Docs;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary><c>docs</c>: the reference pages, made from the catalogue.</summary>
internal static class DocsCommand
{
    private const string Help = """
        Examples:
          respderive docs
          respderive docs --out /tmp/reference

        Exit codes: 0 written, 2 wrong request, 3 the folder cannot be written.
        """;

    public static Command Create(Catalogue catalogue)
    {
        var folder = new Option<string>("--out") { Description = "Folder of the pages.", DefaultValueFactory = _ => Path.Combine("docs", "reference"), HelpName = "FOLDER" };
        var command = new Command("docs", "Writes the reference pages of every derived value.") { folder };
        Examples.Add(command, Help);
        command.SetAction((parsed, cancel) => WriteAsync(catalogue, parsed.GetValue(folder)!, parsed.InvocationConfiguration, cancel));
        return command;
    }

    private static async Task<int> WriteAsync(Catalogue catalogue, string folder, InvocationConfiguration streams, CancellationToken cancel)
    {
        try
        {
            var pages = Reference.Of(catalogue);
            foreach (var (path, text) in pages)
            {
                var file = Path.Combine(folder, path);
                Directory.CreateDirectory(Path.GetDirectoryName(file)!);
                await File.WriteAllTextAsync(file, text, cancel);
            }

            await streams.Output.WriteLineAsync($"{pages.Count} pages in {folder}");
            return Exit.Ok;
        }
        catch (Exception wrong) when (wrong is IOException or UnauthorizedAccessException)
        {
            await streams.Error.WriteLineAsync(wrong.Message);
            return Exit.Environment;
        }
    }
}
