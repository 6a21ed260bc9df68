using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>Rows over the whole catalogue, so that a new definition is tested by existing.</summary>
public static class CatalogueData
{
    public static Definition Of(string key) => Catalogue.Shipped.Find(key)!;

    public static TheoryData<string> Definitions => [.. Catalogue.Shipped.All.Select(definition => definition.Key)];

    public static TheoryData<string, int> Vectors => Rows(definition => definition.Vectors.Count);

    public static TheoryData<string, int> Gates => Rows(definition => definition.Gates.Count);

    /// <summary>Every quantity a definition or one of its parts can take.</summary>
    public static IEnumerable<Kind> Quantities(Definition definition) =>
        Chain.Slots(definition).SelectMany(slot => slot.Kinds).Concat(definition.Watched).Where(kind => !kind.IsCoded).Distinct();

    private static TheoryData<string, int> Rows(Func<Definition, int> count)
    {
        var rows = new TheoryData<string, int>();
        foreach (var definition in Catalogue.Shipped.All)
        {
            for (var i = 0; i < count(definition); i++)
            {
                rows.Add(definition.Key, i);
            }
        }

        return rows;
    }
}
