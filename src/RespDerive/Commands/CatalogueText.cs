using System.Globalization;
using System.Text;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Commands;

/// <summary>The readable form of the catalogue.</summary>
internal static class CatalogueText
{
    /// <summary>One line a definition, under its purpose.</summary>
    public static string List(IReadOnlyList<Definition> definitions)
    {
        // One table, so that columns line up across headings.
        var rows = definitions.Select(definition => (definition.Purpose, Row: new[]
        {
            definition.Key,
            definition.Result.Unit ?? "",
            definition.Codes.FirstOrDefault(code => code.System == "http://loinc.org") is { } loinc ? "LOINC " + loinc.Code : "",
            "needs " + string.Join(", ", definition.Result.Needs.Select(Symbol)) + Mark(definition),
        })).ToArray();
        var lines = Columns.Of([.. rows.Select(row => row.Row)]).Split('\n');
        var text = new StringBuilder();
        foreach (var group in rows.Select((row, i) => (row.Purpose, Line: lines[i])).GroupBy(row => row.Purpose).OrderBy(group => group.Key, StringComparer.Ordinal))
        {
            text.Append(group.Key).Append('\n').AppendJoin('\n', group.Select(row => row.Line)).Append("\n\n");
        }

        return text.Append("'respderive catalogue DEFINITION' shows one with equation, inputs, gates and sources.\n").ToString();
    }

    /// <summary>Everything about one definition.</summary>
    public static string Of(Definition definition)
    {
        var result = definition.Result;
        var text = new StringBuilder()
            .Append(definition.Key).Append(": ").Append(result.Name).Append("\n\n")
            .Append(Columns.Note("", definition.Summary, 0)).Append('\n')
            .Append(Columns.Note("Equation", definition.Equation))
            .Append(definition is Classification bands ? Bands(bands) : Columns.Note("Unit", (result.Unit == "1" ? "none (1)" : result.Unit) + ", " + Plural(definition.Decimals, "decimal")))
            .Append(Columns.Note("Assumes", definition.Assumptions))
            .Append(Columns.Note("Caution", definition.Caution))
            .Append(Columns.Note("Called for", CalledFor(definition)));
        if (!result.IsCoded)
        {
            text.Append(Columns.Note("Usual", Range(definition.Usual.Least, definition.Usual.Greatest, result.Unit) + "; outside, it is flagged"))
                .Append(Columns.Note("Possible", Range(result.Least, result.Greatest, result.Unit) + "; outside, it is withheld"));
        }

        if (definition.GreatestRelativeUncertainty is { } greatest)
        {
            text.Append(Columns.Note("Certainty", $"withheld above a relative standard uncertainty of {Figures.Percent(greatest)}"));
        }

        if (definition.Aliases.Count > 0)
        {
            text.Append(Columns.Note("Also", string.Join(", ", definition.Aliases)));
        }

        foreach (var code in definition.Codes)
        {
            text.Append(Columns.Note(code.System == "http://loinc.org" ? "LOINC" : "MDC", $"{code.Code} {code.Display}"));
        }

        text.Append("\nInputs, best first where several will do\n").Append(Inputs(definition));
        if (definition.Gates.Count > 0)
        {
            text.Append("\nWithheld when\n").Append(Columns.Of([.. definition.Gates.Select(gate => new[] { gate.Text, gate.Code })]));
        }

        var flags = definition.FlagRules.Select(rule => rule.Flag)
            .Concat(Chain(definition.Result.Needs).SelectMany(slot => slot.Options).Select(option => option.Flag).OfType<string>()).Distinct().ToArray();
        if (flags.Length > 0)
        {
            text.Append("\nFlags\n").Append(string.Concat(flags.Select(flag => Columns.Note(flag, Flags.Text(flag), 24))));
        }

        text.Append("\nWorked examples\n").Append(string.Concat(definition.Vectors.Select(vector => Columns.Note(Name(vector.Evidence), $"{vector.Source} ({Inputs(vector)} → {Expected(result, vector)})"))));
        return text.Append("\nSources\n").Append(string.Concat(definition.Citations.Select(citation => Columns.Note("", citation.Text + (citation.Doi is { } doi ? $" doi:{doi}" : ""), 0)))).ToString();
    }

    /// <summary>The symbol a slot is best known by.</summary>
    internal static string Symbol(Slot slot) => (slot.Kinds.FirstOrDefault(kind => kind.Name == slot.Name) ?? slot.Kinds.First()).Symbol;

    /// <summary>The slots of a definition and of those it rests on.</summary>
    internal static IEnumerable<Slot> Chain(IEnumerable<Slot> slots) => slots.SelectMany(slot => slot.Kinds.SelectMany(kind => Chain(kind.Needs)).Prepend(slot)).Distinct();

    /// <summary>The inputs with ranges and units, best first.</summary>
    internal static string Inputs(Definition definition) => Columns.Of([.. InputRows(definition)]);

    private static IEnumerable<string[]> InputRows(Definition definition)
    {
        foreach (var slot in Chain(definition.Result.Needs.Concat(definition.ByIdentity)))
        {
            foreach (var kind in slot.Kinds)
            {
                yield return
                [
                    kind.Symbol, kind.Name, kind.Key,
                    kind.IsCoded ? string.Join(" | ", kind.Codes) : Range(kind.Least, kind.Greatest, kind.Unit),
                    kind.Formula is not null ? "given, or computed" : kind.Assumed is { } assumed ? $"assumed {(kind.IsCoded ? kind.Codes[(int)assumed] : Figures.Plain(assumed))} unless given" : "",
                ];
            }
        }
    }

    /// <summary>What sets a definition apart from those that simply run.</summary>
    private static string Mark(Definition definition) => definition.ByHandOnly ? " (by hand only)" : definition.OnByDefault ? "" : " (off by default)";

    private static string Bands(Classification bands) =>
        string.Concat(bands.Result.Codes.Select(code => Columns.Note("Code", $"{code}: {bands.Text(code)}")))
        + string.Concat(bands.Criteria.Select(criterion => Columns.Note("Criterion",
            $"{criterion.Name} by {criterion.Number.Result.Symbol}, rising: {Cuts(criterion)}; a cut-point itself belongs {(criterion.CutIsBelow ? "below" : "above")}")));

    public static string Cuts(Criterion criterion) =>
        string.Concat(criterion.Codes.Select((code, i) => i < criterion.Cuts.Count ? string.Create(CultureInfo.InvariantCulture, $"{code} | {criterion.Cuts[i]} | ") : code));

    public static string Expected(Kind result, Vector vector) =>
        result.IsCoded ? result.Codes[(int)vector.Expected] : Figures.Plain(vector.Expected) + Figures.Unit(result.Unit);

    private static string CalledFor(Definition definition)
    {
        var calling = definition.Calling;
        if (calling.Anchors.Count == 0)
        {
            return "by hand only; never published";
        }

        var text = (definition.OnByDefault ? "" : "only where the site names it; ") + "by " + string.Join(", else ", calling.Anchors.Select(kind => kind.Name))
            + (calling.Cadence == Cadence.QuarterHour ? "; the first in each quarter of an hour" : "; each, or the first in each quarter of an hour of a streamed signal");
        text += calling.OnlyWith.Count > 0 ? "; only when the patient's record of the last 24 h shows that it applies" : "";
        return text + (calling.NotWith.Count > 0 ? $"; not beside {string.Join(", ", calling.NotWith.Select(kind => kind.Name))}" : "");
    }

    private static string Range(double least, double greatest, string? unit) => $"{Figures.Plain(least)} to {Figures.Plain(greatest)}{Figures.Unit(unit)}";

    private static string Plural(int count, string word) => string.Create(CultureInfo.InvariantCulture, $"{count} {word}{(count == 1 ? "" : "s")}");

    private static string Name(Evidence evidence) => evidence switch { Evidence.Published => "published", Evidence.Limit => "limit", _ => "regression" };

    private static string Inputs(Vector vector) => string.Join(", ", vector.Inputs.Select(given => $"{given.Name} {given.Typed}"));
}
