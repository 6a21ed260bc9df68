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
}

/// <summary>
/// The root values of one computation. Formulas ask it for a kind, a slot or the result of another definition;
/// what is not a root is computed from the roots, so a chain is always a function of roots alone.
/// </summary>
public sealed class Roots
{
    private readonly Root[] _roots;

    /// <summary>Takes the roots of one computation; one per kind.</summary>
    public Roots(IEnumerable<Root> roots) => _roots = [.. roots];

    /// <summary>The roots.</summary>
    public IReadOnlyList<Root> All => _roots;

    /// <summary>Value of a kind: the root if there is one, else computed by the definition that yields it.</summary>
    /// <exception cref="KeyNotFoundException">No root and no formula.</exception>
    public double this[Kind kind]
    {
        get
        {
            var i = IndexOf(kind);
            return i >= 0 ? _roots[i].Value : kind.Formula is { } formula ? formula(this) : throw new KeyNotFoundException(kind.Key);
        }
    }

    /// <summary>Value of a slot: its first option that is complete, terms added.</summary>
    public double this[Slot slot] => slot.Chosen(this) is { } option ? option.Sum(this) : throw new KeyNotFoundException(slot.Name);

    /// <summary>True when the kind is itself a root.</summary>
    public bool Has(Kind kind) => IndexOf(kind) >= 0;

    /// <summary>True when one option of the slot is complete.</summary>
    public bool Has(Slot slot) => slot.Chosen(this) is not null;

    /// <summary>Code of a coded root; null when absent.</summary>
    public string? Code(Kind kind) => IndexOf(kind) is var i && i >= 0 ? kind.Codes[(int)_roots[i].Value] : null;

    internal int IndexOf(Kind kind)
    {
        for (var i = 0; i < _roots.Length; i++)
        {
            if (ReferenceEquals(_roots[i].Kind, kind))
            {
                return i;
            }
        }

        return -1;
    }

    /// <summary>Sets one root; used by the uncertainty budget only, which puts the old value back.</summary>
    internal void Restore(int index, double value) => _roots[index] = _roots[index] with { Value = value };
}
