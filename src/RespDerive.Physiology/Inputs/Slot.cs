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
        for (var i = 0; i < AnyOf.Count; i++)
        {
            if (roots.Has(AnyOf[i]))
            {
                return AnyOf[i];
            }
        }

        // A result of another definition counts as present when that definition can be computed from the roots.
        for (var i = 0; i < AnyOf.Count; i++)
        {
            if (AnyOf[i].ComputableFrom(roots))
            {
                return AnyOf[i];
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
        for (var i = 0; i < Terms.Count; i++)
        {
            sum += roots[Terms[i].Present(roots)!];
        }

        return sum;
    }

    internal bool Complete(Roots roots)
    {
        for (var i = 0; i < Terms.Count; i++)
        {
            if (Terms[i].Present(roots) is null)
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
    private static readonly Lock Numbering = new();
    private static int _last = -1;
    private Slot? _numbered;
    private int _number;

    /// <summary>A slot with a single option.</summary>
    public Slot(Kind kind, Pairing pairing, string missing = Withheld.InputMissing) : this(kind.Name, [new Option(kind, pairing)], missing)
    {
    }

    /// <summary>True when the options are different quantities of which the first at hand counts; giving several is then no contradiction.</summary>
    public bool Alternatives { get; init; }

    /// <summary>Every kind that may fill the slot.</summary>
    public IEnumerable<Kind> Kinds => Options.SelectMany(option => option.Terms).SelectMany(term => term.AnyOf).Distinct();

    /// <summary>The derived kind that is the one way to fill the slot; null when there are other ways.</summary>
    internal Kind? OnlyDerived
    {
        get
        {
            for (var i = 0; Options.Count == 1 && i < Options[0].Terms.Count; i++)
            {
                var kinds = Options[0].Terms[i].AnyOf;
                for (var j = 0; j < kinds.Count; j++)
                {
                    if (kinds[j].Formula is not null)
                    {
                        return kinds[j];
                    }
                }
            }

            return null;
        }
    }

    /// <summary>Place in tables by slot; given to slots that are evaluated only, so that tables stay small.</summary>
    /// <remarks>A copy made by <c>with</c> is another slot and takes a number of its own.</remarks>
    internal int Number => ReferenceEquals(Volatile.Read(ref _numbered), this) ? _number : Numbered();

    /// <summary>The option that fills the slot; null when none does.</summary>
    internal Option? Chosen(Roots roots) => roots.Chosen(this);

    /// <summary>A slot is equal to itself only: two definitions may ask for the same thing in two slots.</summary>
    public bool Equals(Slot? other) => ReferenceEquals(this, other);

    /// <inheritdoc/>
    public override int GetHashCode() => System.Runtime.CompilerServices.RuntimeHelpers.GetHashCode(this);

    private int Numbered()
    {
        lock (Numbering)
        {
            if (!ReferenceEquals(_numbered, this))
            {
                _number = ++_last;
                Volatile.Write(ref _numbered, this);
            }

            return _number;
        }
    }
}
