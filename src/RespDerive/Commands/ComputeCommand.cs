using System.CommandLine;
using RespDerive.Physiology;

namespace RespDerive.Commands;

/// <summary><c>compute</c>: one definition by hand, or a stream of them.</summary>
internal static class ComputeCommand
{
    private const string Help = """
        Names are keys or symbols (see 'catalogue DEFINITION') and case-sensitive. A value may carry a UCUM unit.

        Examples:
          respderive compute pf-ratio "pao2=90 mm[Hg]" fio2=0.40
          respderive compute static-compliance "VT=420 mL" Pplat=24 PEEPtot=10 --output json
          respderive compute predicted-body-weight sex=female "height=165 cm"
          respderive compute --lines < requests.ndjson
          respderive compute elastance          (what it needs)

        A request line: {"id":"1","definition":"pf-ratio","inputs":{"PaO2":{"value":12,"unit":"kPa"},"FiO2":0.4}}
        Exit codes: 0 a value, 1 withheld, 2 wrong request, 5 a line that could not be used.
        """;

    public static Command Create(Catalogue catalogue)
    {
        var definition = new Argument<string?>("DEFINITION") { Description = "Key of the definition.", Arity = ArgumentArity.ZeroOrOne };
        var values = new Argument<string[]>("name=value") { Description = "An input, such as \"pao2=90 mm[Hg]\", sex=male or fio2=missing.", Arity = ArgumentArity.ZeroOrMore };
        var lines = new Option<bool>("--lines") { Description = "Reads one JSON request a line from standard input and answers each on a line." };
        var output = OutputOption.Create();
        var command = new Command("compute", "Computes one value by hand, with its uncertainty and what it rests on.") { definition, values, lines, output };
        command.Validators.Add(result =>
        {
            if (result.GetValue(lines) == result.GetValue(definition) is not null)
            {
                result.AddError("Give either a DEFINITION with its inputs, or --lines.");
            }
        });
        Examples.Add(command, Help);
        command.SetAction((parsed, cancel) => parsed.GetValue(lines)
            ? ComputeLines.RunAsync(catalogue, Console.In, parsed.InvocationConfiguration.Output, cancel)
            : Task.FromResult(One(catalogue, parsed.GetValue(definition)!, parsed.GetValue(values)!, parsed.GetValue(output) == "json", parsed.InvocationConfiguration)));
        return command;
    }

    private static int One(Catalogue catalogue, string key, string[] words, bool json, InvocationConfiguration streams)
    {
        try
        {
            var definition = ComputeRequest.Definition(catalogue, key);
            var hand = ByHand.Compute(definition, words.Select(ComputeRequest.Word), catalogue);
            streams.Output.Write(json ? OutputOption.Pretty(ComputeJson.Of(hand, null)) + "\n" : words.Length == 0 ? ComputeText.Needs(definition) : ComputeText.Of(hand));
            return hand.Computation.Withheld is null ? Exit.Ok : Exit.Findings;
        }
        catch (UnusableRequestException wrong)
        {
            if (json)
            {
                streams.Output.WriteLine(OutputOption.Pretty(ComputeJson.Error(null, key, wrong.Message)));
            }
            else
            {
                streams.Error.WriteLine(wrong.Message);
            }

            return Exit.Usage;
        }
    }
}
