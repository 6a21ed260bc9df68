using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology.Tests;

/// <summary>Rows over the whole catalogue, so that a new definition is tested by existing.</summary>
public static class CatalogueData
{
    public static Definition Of(string key) => Catalogue.Shipped.Find(key)!;

    public static TheoryData<string> Definitions => [.. Catalogue.Shipped.All.Select(definition => definition.Key)];

    /// <summary>Those whose result is a number and not a band.</summary>
    public static TheoryData<string> Numbers => [.. Catalogue.Shipped.All.Where(definition => definition is not Classification).Select(definition => definition.Key)];

    public static TheoryData<string, int> Vectors => Rows(definition => definition.Vectors.Count);

    public static TheoryData<string, int> Gates => Rows(definition => definition.Gates.Count);

    /// <summary>Every quantity a definition or one of its parts can take.</summary>
    public static IEnumerable<Kind> Quantities(Definition definition) =>
        Chain.Slots(definition).SelectMany(slot => slot.Kinds).Concat(definition.Watched).Where(kind => !kind.IsCoded).Distinct();

    /// <summary>Values given by hand as roots.</summary>
    public static Roots RootsOf(Definition definition, IEnumerable<Given> given)
    {
        var vocabulary = new Vocabulary(definition, Catalogue.Shipped);
        return new Roots(given.Select(one =>
        {
            var kind = vocabulary.Find(one.Name);
            Ucum.TryConvert(one.Value ?? 0, one.Unit ?? "1", kind.Unit ?? "1", out var value);
            return new Root(kind, kind.IsCoded ? kind.Codes.ToList().IndexOf(one.Code!) : (double)value, one.Transducer);
        }));
    }

    /// <summary>The same, with the constants the definition assumes.</summary>
    public static Roots WithConstants(Definition definition, IEnumerable<Given> given)
    {
        var roots = RootsOf(definition, given);
        foreach (var kind in Chain.Slots(definition).SelectMany(slot => slot.Kinds).Where(kind => kind.Assumed is not null && !roots.Has(kind)).Distinct().ToArray())
        {
            roots.Add(new Root(kind, kind.Assumed!.Value, Assumed: true));
        }

        return roots;
    }

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
