using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>A condition under which a value must be withheld.</summary>
/// <param name="Code">Withheld code.</param>
/// <param name="Text">The condition in words.</param>
/// <param name="Reads">Kinds it looks at beyond the definition's own inputs.</param>
/// <param name="Trips">True when the value must be withheld. A gate whose inputs are missing does not trip.</param>
/// <param name="TrippedBy">Inputs that trip it, as they would be given by hand.</param>
public sealed record Gate(string Code, string Text, IReadOnlyList<Kind> Reads, Func<Roots, bool> Trips, params IReadOnlyList<Given> TrippedBy)
{
    /// <summary>Kinds it looks at only among values given by hand: with an anchor from the record the condition cannot arise.</summary>
    public IReadOnlyList<Kind> ReadsByHand { get; init; } = [];
}

/// <summary>A condition that is published with the value.</summary>
/// <param name="Flag">One of <see cref="Flags"/>.</param>
/// <param name="Reads">Kinds it looks at beyond the definition's own inputs.</param>
/// <param name="Raised">True when the flag is raised.</param>
public sealed record FlagRule(string Flag, IReadOnlyList<Kind> Reads, Func<Roots, bool> Raised);
