using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>What an evaluation looks up in a definition, as arrays made once: the definition's own lists are made anew at each look.</summary>
internal sealed class Plan(Definition definition)
{
    public readonly Func<Roots, double> Formula = definition.Result.Formula!;
    public readonly Slot[] Needs = [.. definition.Result.Needs];
    public readonly Slot[] ByIdentity = [.. definition.ByIdentity];
    public readonly Gate[] Gates = [.. definition.Gates];
    public readonly FlagRule[] FlagRules = [.. definition.FlagRules];
    public readonly Kind[] OneTransducer = [.. definition.OneTransducer];
    private Slot[]? _chain;
    private Kind[]? _watched;

    /// <summary>Every slot the definition could ever use, its own first, then those of the definitions it rests on.</summary>
    public Slot[] Chain => _chain ??= [.. Physiology.Chain.Slots(Needs.Concat(ByIdentity))];

    /// <summary>Kinds that only gates and flag rules look at.</summary>
    public Kind[] Watched => _watched ??= [.. Gates.SelectMany(gate => gate.Reads).Concat(FlagRules.SelectMany(rule => rule.Reads)).Distinct()];

    /// <summary>The slots by which the value can be had from these roots: its own, else those of the identity.</summary>
    public Slot[] Path(Roots roots) => ByIdentity.Length > 0 && !roots.HasAll(Needs) && roots.HasAll(ByIdentity) ? ByIdentity : Needs;
}
