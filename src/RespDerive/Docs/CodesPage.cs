using RespDerive.Physiology;

namespace RespDerive.Docs;

/// <summary>Withheld codes and flags with their texts, and which definitions use them.</summary>
internal static class CodesPage
{
    public static string Of(Catalogue catalogue) => new Markdown("Codes of withheld values and flags")
        .Paragraph("The codes are permanent.")
        .Heading("Withheld")
        .Paragraph("A withheld value is a decision not to publish. When several reasons apply, the first in this order is given.")
        .Table(["Code", "Meaning", "Gates of"], Withheld.All.Select(one => new[]
        {
            $"`{one.Code}`", one.Text, Links(catalogue, definition => definition.Gates.Any(gate => gate.Code == one.Code)),
        }))
        .Heading("Flags")
        .Paragraph("A flag is published with the value.")
        .Table(["Flag", "Meaning", "Rules of"], Flags.All.OrderBy(flag => flag.Key, StringComparer.Ordinal).Select(flag => new[]
        {
            $"`{flag.Key}`", flag.Value, Links(catalogue, definition => definition.FlagRules.Any(rule => rule.Flag == flag.Key)),
        }))
        .ToString();

    private static string Links(Catalogue catalogue, Func<Definition, bool> uses) =>
        string.Join(", ", catalogue.All.Where(uses).Select(definition => $"[{definition.Key}](derived/{definition.Key}.md)"));
}
