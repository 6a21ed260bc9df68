using RespDerive.Physiology;

namespace RespDerive.Docs;

/// <summary>The reference pages of a catalogue, by path below the reference folder. Pure: same catalogue, same pages.</summary>
internal static class Reference
{
    public static IReadOnlyDictionary<string, string> Of(Catalogue catalogue)
    {
        var pages = new SortedDictionary<string, string>(StringComparer.Ordinal)
        {
            ["derived/index.md"] = IndexPage.Of(catalogue),
            ["anchors.md"] = AnchorsPage.Of(catalogue),
            ["codes.md"] = CodesPage.Of(catalogue),
        };
        foreach (var definition in catalogue.All)
        {
            pages[$"derived/{definition.Key}.md"] = DefinitionPage.Of(definition, catalogue);
        }

        return pages;
    }
}
