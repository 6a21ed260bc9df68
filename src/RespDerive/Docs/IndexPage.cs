using RespDerive.Physiology;

namespace RespDerive.Docs;

/// <summary>The list of definitions, grouped by purpose.</summary>
internal static class IndexPage
{
    public static string Of(Catalogue catalogue)
    {
        var page = new Markdown("Derived values").Paragraph(
            "A derived number is arithmetic on the values given; it is not a diagnosis, an alarm or an order. "
            + "See also [when each is called for](../anchors.md) and [the codes of withheld values and flags](../codes.md).");
        foreach (var group in catalogue.All.GroupBy(definition => definition.Purpose).OrderBy(group => group.Key, StringComparer.Ordinal))
        {
            page.Heading(group.Key).Table(["Definition", "Symbol", "What it is", "Unit", "Runs"], group.Select(definition => new[]
            {
                $"[{definition.Key}]({definition.Key}.md)", $"`{definition.Result.Symbol}`", definition.Summary, definition.Result.Unit ?? "coded", Runs(definition),
            }));
        }

        return page.ToString();
    }

    /// <summary>Whether a definition runs without being asked for.</summary>
    public static string Runs(Definition definition) => definition.ByHandOnly ? "by hand only" : definition.OnByDefault ? "by default" : "when the site names it";
}
