using System.Globalization;
using RespDerive.Commands;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Docs;

/// <summary>Everything about one definition, on a page.</summary>
internal static class DefinitionPage
{
    public static string Of(Definition definition, Catalogue catalogue)
    {
        var result = definition.Result;
        var page = new Markdown(definition.Key)
            .Paragraph(definition.Summary)
            .Paragraph($"**Caution.** {definition.Caution}")
            .Table(["", ""], Facts(definition))
            .Heading("Equation")
            .Block("text", definition.Equation);
        if ((definition.EquationInLatex ?? Latex.Of(definition.Equation)) is { } latex)
        {
            page.Block("math", latex);
        }

        if (Pictures.Caption(definition) is { } caption)
        {
            page.Paragraph($"![{caption}](../plots/{definition.Key}.svg)").Paragraph(caption);
        }

        var slots = CatalogueText.Chain(result.Needs.Concat(definition.ByIdentity)).ToArray();
        page.Paragraph($"Assumes: {definition.Assumptions}")
            .Heading("Symbols")
            .Table(["Symbol", "Meaning", "Key", "Unit", "Plausible range", "Standard uncertainty of a reading"], slots.SelectMany(slot => slot.Kinds).Distinct().Prepend(result).Select(Symbol))
            .Heading("Needs")
            .Table(["Input", "Filled by, best first"], result.Needs.Select(slot => new[] { slot.Name, Pairings.Of(slot) }));
        if (definition.ByIdentity.Count > 0)
        {
            page.Paragraph("By hand also from: " + string.Join(", ", definition.ByIdentity.Select(slot => slot.Name)) + ".");
        }

        if (definition is Classification bands)
        {
            page.Heading("Bands")
                .Table(["Code", "Meaning"], result.Codes.Select(code => new[] { $"`{code}`", bands.Text(code) }))
                .Table(["Criterion", "By", "Bands, rising", "A cut-point itself belongs"], bands.Criteria.Select(criterion => new[]
                {
                    criterion.Name, $"[{criterion.Number.Key}]({criterion.Number.Key}.md)", CatalogueText.Cuts(criterion), criterion.CutIsBelow ? "below" : "above",
                }));
        }

        page.Heading("Withheld")
            .Paragraph((result.IsCoded ? "Where the number it is taken from is physically impossible it is withheld." : $"Outside {Range(result)} it is physically impossible and withheld.")
                + (definition.GreatestRelativeUncertainty is { } greatest ? $" So it is above a relative standard uncertainty of {Figures.Percent(greatest)}." : ""));
        if (definition.Gates.Count > 0)
        {
            page.Table(["When", "Code", "For example"], definition.Gates.Select(gate => new[] { gate.Text, $"`{gate.Code}`", Inputs(gate.TrippedBy) }));
        }

        return page.Heading("Flags").Table(["Flag", "Meaning"], FlagsOf(definition, slots).Select(flag => new[] { $"`{flag}`", Flags.Text(flag) }))
            .Heading("Worked example")
            .Block("text", Example(definition, catalogue))
            .Heading("Evidence")
            .Table(["Kind", "Source", "Inputs", "Expected", "Within"], definition.Vectors.Select(vector => Row(result, vector)))
            .Heading("Sources")
            .List(definition.Citations.Select(citation => citation.Text + (citation.Doi is { } doi ? $" [doi:{doi}](https://doi.org/{doi})" : "")))
            .ToString();
    }

    private static IEnumerable<string[]> Facts(Definition definition)
    {
        var result = definition.Result;
        yield return ["Name", result.Name];
        yield return ["Symbol", $"`{result.Symbol}`"];
        yield return ["Unit", result.Unit is { } unit ? $"`{unit}`, {definition.Decimals.ToString(CultureInfo.InvariantCulture)} decimal{(definition.Decimals == 1 ? "" : "s")}" : "a code: " + string.Join(", ", result.Codes)];
        yield return ["Purpose", definition.Purpose];
        yield return ["Revision", definition.Revision.ToString(CultureInfo.InvariantCulture)];
        yield return ["Runs", IndexPage.Runs(definition)];
        if (definition.Aliases.Count > 0)
        {
            yield return ["Also called", string.Join(", ", definition.Aliases.Select(alias => $"`{alias}`"))];
        }

        if (definition.Calling.Anchors.Count > 0)
        {
            yield return ["Called for by", $"{AnchorsPage.Anchors(definition.Calling)} ({AnchorsPage.Context(definition.Calling)}; {AnchorsPage.Cadence(definition.Calling)})"];
        }

        if (!result.IsCoded)
        {
            yield return ["Usual", $"{Figures.Plain(definition.Usual.Least)} to {Figures.Plain(definition.Usual.Greatest)}{Figures.Unit(result.Unit)}"];
            yield return ["Possible", Range(result)];
        }

        yield return ["Standard codes", definition.Codes.Count == 0 ? "none is verified for exactly this value" : string.Join("<br>", definition.Codes.Select(code => $"`{code.System}` `{code.Code}` {code.Display}"))];
    }

    private static string[] Symbol(Kind kind) =>
    [
        $"`{kind.Symbol}`", kind.Name, $"`{kind.Key}`", kind.Unit is { } unit ? $"`{unit}`" : "code",
        kind.IsCoded ? string.Join(", ", kind.Codes) : Range(kind),
        Spread(kind) + (kind.Assumed is { } assumed && !kind.IsCoded ? $"; assumed {Figures.Plain(assumed)} unless given" : "") + (kind.Formula is not null ? "; or computed" : ""),
    ];

    private static string Spread(Kind kind)
    {
        var spread = kind.Tolerance;
        if (kind.IsCoded || (spread.Absolute == 0 && spread.Relative == 0))
        {
            return "none";
        }

        var parts = new[] { spread.Absolute > 0 ? Figures.Plain(spread.Absolute) : null, spread.Relative > 0 ? Figures.Plain(100 * spread.Relative) + " %" : null }.OfType<string>();
        return (spread.Rectangular ? "limit ±(" + string.Join(" + ", parts) + ")/√3" : string.Join(" or ", parts)) + $" ({spread.Source})";
    }

    private static string Range(Kind kind) => double.IsFinite(kind.Least) && double.IsFinite(kind.Greatest)
        ? $"{Figures.Plain(kind.Least)} to {Figures.Plain(kind.Greatest)}{Figures.Unit(kind.Unit)}" : "any";

    private static IEnumerable<string> FlagsOf(Definition definition, Slot[] slots) => definition.FlagRules.Select(rule => rule.Flag)
        .Concat(slots.SelectMany(slot => slot.Options).Select(option => option.Flag).OfType<string>())
        .Append(Flags.OutsideUsual).Distinct().Order(StringComparer.Ordinal);

    private static string Example(Definition definition, Catalogue catalogue)
    {
        var given = definition.Vectors[0].Inputs;
        return $"$ {ComputeText.Command(definition, given)}\n{ComputeText.Of(ByHand.Compute(definition, given, catalogue))}";
    }

    private static string[] Row(Kind result, Vector vector) =>
    [
        vector.Evidence switch { Evidence.Published => "published", Evidence.Limit => "limit", _ => "regression" },
        vector.Source, Inputs(vector.Inputs), CatalogueText.Expected(result, vector), vector.Within.ToString("0.##########", CultureInfo.InvariantCulture),
    ];

    private static string Inputs(IEnumerable<Given> given) => string.Join(", ", given.Select(one => $"`{one.Name}` {one.Typed}"));
}
