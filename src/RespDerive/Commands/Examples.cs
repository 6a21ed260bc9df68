using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;

namespace RespDerive.Commands;

/// <summary>Text that follows the usual help of a command: examples, forms, exit codes.</summary>
internal sealed class Examples(string text) : SynchronousCommandLineAction
{
    private readonly HelpAction _usual = new();

    /// <summary>Adds the text to the help of a command.</summary>
    public static void Add(Command command, string text)
    {
        if (command.Options.OfType<HelpOption>().FirstOrDefault() is { } help)
        {
            help.Action = new Examples(text);
        }
        else
        {
            command.Options.Add(new HelpOption { Action = new Examples(text) });
        }
    }

    /// <inheritdoc/>
    public override int Invoke(ParseResult parseResult)
    {
        var code = _usual.Invoke(parseResult);
        parseResult.InvocationConfiguration.Output.WriteLine(text);
        return code;
    }
}
