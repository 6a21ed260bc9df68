using System.CommandLine;
using System.Text.Json.Nodes;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary><c>catalogue</c>: what is derived, or everything about one value.</summary>
internal static class CatalogueCommand
{
    private const string Help = """
        Examples:
          respderive catalogue
          respderive catalogue driving-pressure
          respderive catalogue pf-ratio --output json
        """;

    public static Command Create(Catalogue catalogue)
    {
        var definition = new Argument<string?>("DEFINITION") { Description = "Key of the definition; all are listed without it.", Arity = ArgumentArity.ZeroOrOne };
        var output = OutputOption.Create();
        var command = new Command("catalogue", "Lists the definitions, or shows one with its equation, inputs, gates, limits and sources.") { definition, output };
        Examples.Add(command, Help);
        command.SetAction(parsed => Show(catalogue, parsed.GetValue(definition), parsed.GetValue(output) == "json", parsed.InvocationConfiguration));
        return command;
    }

    private static int Show(Catalogue catalogue, string? key, bool json, InvocationConfiguration streams)
    {
        if (key is null)
        {
            streams.Output.Write(json
                ? OutputOption.Pretty(new JsonArray([.. catalogue.All.Select(CatalogueJson.Brief)])) + "\n"
                : CatalogueText.List(catalogue.All));
            return Exit.Ok;
        }

        try
        {
            var definition = ComputeRequest.Definition(catalogue, key);
            streams.Output.Write(json ? OutputOption.Pretty(CatalogueJson.Full(definition)) + "\n" : CatalogueText.Of(definition));
            return Exit.Ok;
        }
        catch (UnusableRequestException wrong)
        {
            streams.Error.WriteLine(wrong.Message);
            return Exit.Usage;
        }
    }
}
