using System.Text;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Commands;

/// <summary>The readable form of a computation: the number first, then what it rests on.</summary>
internal static class ComputeText
{
    public static string Of(ByHand hand)
    {
        var (definition, computed) = (hand.Definition, hand.Computation);
        var text = new StringBuilder().Append(definition.Key).Append(": ").Append(definition.Result.Name).Append("\n\n");
        if (computed.Placement is { } placement)
        {
            Append(text, (Classification)definition, placement);
        }
        else if (computed.Withheld is null)
        {
            text.Append("  ").Append(definition.Result.Symbol).Append(" = ").Append(Publication.Text(computed.Published, definition.Decimals)).Append(Figures.Unit(definition.Result.Unit))
                .Append("   ± ").Append(Figures.TwoFigures(computed.Uncertainty)).Append(Figures.Unit(definition.Result.Unit)).Append(" (one standard uncertainty)\n\n");
        }
        else
        {
            text.Append("  No value. ").Append(ComputeJson.Reason(computed)).Append("\n  (withheld: ").Append(computed.Withheld).Append(")\n\n");
        }

        if (hand.Inputs.Count > 0)
        {
            text.Append(Columns.Of([.. hand.Inputs.Select(input => Row(input, computed)), .. SharedRows(computed), .. hand.Intermediates.Select(Row)])).Append('\n');
        }

        text.Append(Columns.Note("Equation", definition.Equation));
        foreach (var flag in computed.Flags)
        {
            text.Append(Columns.Note("Flag", $"{Flags.Text(flag)} ({flag})"));
        }

        if (hand.Unused.Count > 0)
        {
            text.Append(Columns.Note("Not used", string.Join(", ", hand.Unused)));
        }

        return text.Append(Columns.Note("Caution", definition.Caution)).ToString();
    }

    /// <summary>The band in words, the number it was taken from, and every band that number may truly lie in.</summary>
    private static void Append(StringBuilder text, Classification definition, Placement placement)
    {
        var number = placement.Criterion.Number;
        var unit = Figures.Unit(number.Result.Unit);
        text.Append("  ").Append(definition.Text(placement.Code)).Append(" (").Append(placement.Code).Append(")\n  by ").Append(placement.Criterion.Name)
            .Append(" from ").Append(number.Result.Symbol).Append(" = ").Append(Publication.Text(placement.Posted, number.Decimals)).Append(unit)
            .Append(" ± ").Append(Figures.TwoFigures(placement.Uncertainty)).Append(unit).Append(" (one standard uncertainty)\n  probability: ")
            .AppendJoin(", ", placement.Bands.Where(band => band.Probability >= 0.005).Select(band => $"{band.Code} {Figures.Percent(band.Probability)}")).Append("\n\n");
    }

    /// <summary>What a definition needs, for somebody who gave nothing yet.</summary>
    public static string Needs(Definition definition) => new StringBuilder()
        .Append(definition.Key).Append(": ").Append(definition.Result.Name).Append("\n\n")
        .Append("  No value yet. It needs (best first where several will do):\n\n").Append(CatalogueText.Inputs(definition)).Append('\n')
        .Append(Columns.Note("Equation", definition.Equation))
        .Append(Columns.Note("Example", Command(definition, definition.Vectors[0].Inputs)))
        .ToString();

    /// <summary>The command that computes a definition from these values.</summary>
    public static string Command(Definition definition, IEnumerable<Given> given) => $"respderive compute {definition.Key} {string.Join(' ', given.Select(Word))}";

    private static string Word(Given given) => given.Typed.Contains(' ', StringComparison.Ordinal) || given.Typed.Contains('[', StringComparison.Ordinal)
        ? $"\"{given.Name}={given.Typed}\"" : $"{given.Name}={given.Typed}";

    private static string[] Row(HandInput input, Computation computed) =>
    [
        $"{input.Kind.Name} ({input.Kind.Symbol})",
        Value(input),
        input.Assumed ? "assumed" : input.CheckedOnly ? "checked only" : "",
        computed.Withheld is null && !input.CheckedOnly && input.Code is null ? $"{Figures.Percent(input.Share)} of the variance" : "",
    ];

    private static string[] Row((Kind Kind, double Value) intermediate) =>
        [$"{intermediate.Kind.Name} ({intermediate.Kind.Symbol})", Figures.Plain(intermediate.Value) + Figures.Unit(intermediate.Kind.Unit), "computed", ""];

    private static IEnumerable<string[]> SharedRows(Computation computed) => computed.Shares.Where(share => share.Transducer is not null)
        .Select(share => new[] { $"zero offset shared by transducer {share.Transducer}", "", "", $"{Figures.Percent(share.Fraction)} of the variance" });

    private static string Value(HandInput input)
    {
        if (input.Code is { } code)
        {
            return code;
        }

        var value = Figures.Plain(input.Value) + Figures.Unit(input.Kind.Unit);
        return input.Given is { } given && InOtherUnit(given, input.Kind) ? $"{value} (from {given})" : value;
    }

    private static bool InOtherUnit(string given, Kind kind) =>
        given.Split(' ', 2) is [_, var unit] && unit != kind.Unit;
}
