using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>One root value of a computation.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="Value">Canonical unit, or the index of the code.</param>
/// <param name="Transducer">Readings with the same non-null mark share the zero offset of one transducer.</param>
/// <param name="Assumed">True for a constant nobody measured.</param>
/// <param name="Tolerance">Site tolerance in place of the kind's own.</param>
public readonly record struct Root(Kind Kind, double Value, string? Transducer = null, bool Assumed = false, Tolerance? Tolerance = null)
{
    /// <summary>The tolerance in force.</summary>
    public Tolerance Spread => Tolerance ?? Kind.Tolerance;

    /// <summary>True for a value outside the plausible range of its kind, or no number at all.</summary>
    internal bool IsNonsense => Kind.IsCoded
        ? !double.IsInteger(Value) || Value < 0 || Value >= Kind.Codes.Count
        : !double.IsFinite(Value) || Value < Kind.Least || Value > Kind.Greatest;
}
