namespace RespDerive.Physiology.Inputs;

/// <summary>One addend of an option: any of some kinds of equal rank, and how the reading is paired.</summary>
public sealed record Term(IReadOnlyList<Kind> AnyOf, Pairing Pairing)
{
    /// <summary>A term of one kind.</summary>
    public Term(Kind kind, Pairing pairing) : this([kind], pairing)
    {
    }

    internal Kind? Present(Roots roots)
    {
        foreach (var kind in AnyOf)
        {
            if (roots.Has(kind))
            {
                return kind;
            }
        }

        // A result of another definition counts as present when that definition can be computed from the roots.
        foreach (var kind in AnyOf)
        {
            if (kind.ComputableFrom(roots))
            {
                return kind;
            }
        }

        return null;
    }
}

/// <summary>One way to fill a slot: terms that are added, in order of preference among the slot's options.</summary>
/// <param name="Terms">What is added.</param>
/// <param name="Flag">Flag published when this option is used.</param>
/// <param name="Variant">Method variant named in the result.</param>
public sealed record Option(IReadOnlyList<Term> Terms, string? Flag = null, string? Variant = null)
{
    /// <summary>An option of one term.</summary>
    public Option(Kind kind, Pairing pairing, string? flag = null, string? variant = null) : this([new Term(kind, pairing)], flag, variant)
    {
    }

    internal double Sum(Roots roots)
    {
        var sum = 0.0;
        foreach (var term in Terms)
        {
            sum += roots[term.Present(roots)!];
        }

        return sum;
    }

    internal bool Complete(Roots roots)
    {
        foreach (var term in Terms)
        {
            if (term.Present(roots) is null)
            {
                return false;
            }
        }

        return true;
    }
}

/// <summary>One input of a definition.</summary>
/// <param name="Name">What the formula calls it.</param>
/// <param name="Options">Ways to fill it, best first.</param>
/// <param name="Missing">Withheld code when none can be filled.</param>
public sealed record Slot(string Name, IReadOnlyList<Option> Options, string Missing = Withheld.InputMissing)
{
    /// <summary>A slot with a single option.</summary>
    public Slot(Kind kind, Pairing pairing, string missing = Withheld.InputMissing) : this(kind.Name, [new Option(kind, pairing)], missing)
    {
    }

    /// <summary>True when the options are different quantities of which the first at hand counts; giving several is then no contradiction.</summary>
    public bool Alternatives { get; init; }

    /// <summary>Every kind that may fill the slot.</summary>
    public IEnumerable<Kind> Kinds => Options.SelectMany(option => option.Terms).SelectMany(term => term.AnyOf).Distinct();

    internal Option? Chosen(Roots roots)
    {
        foreach (var option in Options)
        {
            if (option.Complete(roots))
            {
                return option;
            }
        }

        return null;
    }
}
