using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>One step of a computation: the option that filled a slot and the kind taken for one of its terms.</summary>
internal readonly record struct Step(Option Option, Kind Kind);

/// <summary>The steps from a result down to its roots.</summary>
internal static class Chain
{
    /// <summary>Every step that is taken for these slots; slots that cannot be filled are passed over.</summary>
    public static IEnumerable<Step> Steps(IReadOnlyList<Slot> needs, Roots roots)
    {
        foreach (var option in needs.Select(roots.Chosen).OfType<Option>())
        {
            foreach (var kind in option.Terms.Select(term => term.Present(roots)).OfType<Kind>())
            {
                yield return new Step(option, kind);
                if (!roots.Has(kind))
                {
                    foreach (var inner in Steps(kind.Needs, roots))
                    {
                        yield return inner;
                    }
                }
            }
        }
    }

    /// <summary>Every slot a definition could ever use, its own first, then those of the definitions it rests on.</summary>
    public static IEnumerable<Slot> Slots(Definition definition) => definition.Plan.Chain;

    internal static IEnumerable<Slot> Slots(IEnumerable<Slot> slots) =>
        slots.SelectMany(slot => slot.Kinds.SelectMany(kind => Slots(kind.Needs)).Prepend(slot)).Distinct();
}
