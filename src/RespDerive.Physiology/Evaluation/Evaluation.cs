using System.Runtime.InteropServices;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>
/// A place to evaluate definitions in, one after the other, without allocating (but for bands): what is found stands in its properties
/// until the next <see cref="Run"/>. Not for several threads at once.
/// </summary>
public sealed class Evaluation
{
    private readonly List<Share> _shares = [];
    private readonly List<string> _flags = [];
    private readonly List<string> _missing = [];
    private readonly Roots _sound = new();
    private readonly Roots _marked = new();
    private int _rank;
    private bool _impossible;

    /// <summary>Unrounded, canonical unit; NaN when withheld.</summary>
    public double Value { get; private set; } = double.NaN;

    /// <summary>The number as published; 0 when withheld.</summary>
    public decimal Published { get; private set; }

    /// <summary>Standard uncertainty, k = 1, same unit.</summary>
    public double Uncertainty { get; private set; }

    /// <summary>Method variant; null for the plain method.</summary>
    public string? Variant { get; private set; }

    /// <summary>The band of a coded result; null for a number.</summary>
    public Placement? Placement { get; private set; }

    /// <summary>Reason for withholding; null when there is a value.</summary>
    public string? Withheld { get; private set; }

    /// <summary>Variance shares.</summary>
    public ReadOnlySpan<Share> Shares => CollectionsMarshal.AsSpan(_shares);

    /// <summary>Flags, ordered.</summary>
    public ReadOnlySpan<string> Flags => CollectionsMarshal.AsSpan(_flags);

    /// <summary>What is missing, in words, when <see cref="Withheld"/> says so.</summary>
    public ReadOnlySpan<string> Missing => CollectionsMarshal.AsSpan(_missing);

    /// <summary>Evaluates a definition on its roots. Never throws for any combination of roots.</summary>
    public void Run(Definition definition, Roots roots)
    {
        Begin();
        var plan = definition.Plan;
        roots = OfOneTransducer(plan.OneTransducer, roots);
        var path = plan.Path(roots);
        FindMissing(path, roots);
        var sound = Sound(roots);
        foreach (var gate in plan.Gates)
        {
            if (gate.Trips(sound))
            {
                Withhold(gate.Code);
                if (gate.Code == Physiology.Withheld.InputMissing)
                {
                    _missing.Add(gate.Text);
                }
            }
        }

        if (Withheld is not null)
        {
            return;
        }

        var value = plan.Formula(roots);
        Follow(path, roots);
        if (_impossible || IsImpossible(definition.Result, value))
        {
            Withhold(Physiology.Withheld.Impossible);
            return;
        }

        if (definition is Classification classification)
        {
            Place(classification, plan, roots, value);
            return;
        }

        var uncertainty = Budget.Standard(roots, plan.Formula, _shares);
        if (!double.IsFinite(uncertainty) || uncertainty > definition.GreatestRelativeUncertainty * Math.Abs(value))
        {
            Withhold(Physiology.Withheld.UncertaintyTooLarge);
            return;
        }

        (Value, Uncertainty, Published) = (value, uncertainty, Publication.Round(value, definition.Decimals));
        Flag(definition, plan, roots);
    }

    /// <summary>A band is taken from the number as it is or would be posted; it has no uncertainty of its own, the number has.</summary>
    private void Place(Classification definition, Plan plan, Roots roots, double index)
    {
        var criterion = definition.CriterionFor(roots);
        var number = criterion.Of(roots);
        if (IsImpossible(criterion.Number.Result, number))
        {
            Withhold(Physiology.Withheld.Impossible);
            return;
        }

        var uncertainty = Budget.Standard(roots, criterion.Of, _shares);
        var posted = Publication.Round(number, criterion.Number.Decimals);
        Placement = new Placement(criterion, criterion.Code(posted), posted, uncertainty, criterion.Bands(number, uncertainty));
        (Value, Variant) = (index, criterion.Name);
        Flag(definition, plan, roots);
        Raise(criterion.Straddles(number, uncertainty) ? Physiology.Flags.BandUncertain : null);
    }

    private void Begin()
    {
        (Value, Published, Uncertainty, Variant, Placement, Withheld) = (double.NaN, 0, 0, null, null, null);
        (_rank, _impossible) = (int.MaxValue, false);
        _shares.Clear();
        _flags.Clear();
        _missing.Clear();
    }

    /// <summary>Of several reasons the first in the order of precedence stands.</summary>
    private void Withhold(string code)
    {
        var rank = Physiology.Withheld.Rank(code);
        if (Withheld is null || rank < _rank)
        {
            (Withheld, _rank) = (code, rank);
        }

        _shares.Clear();
        _flags.Clear();
        Variant = null;
    }

    /// <summary>The roots, with those that must be of one transducer marked so where nothing else is said.</summary>
    private Roots OfOneTransducer(Kind[] kinds, Roots roots)
    {
        if (kinds.Length == 0)
        {
            return roots;
        }

        string? mark = null;
        foreach (var root in roots.Span)
        {
            mark ??= Array.IndexOf(kinds, root.Kind) >= 0 ? root.Transducer : null;
        }

        _marked.Clear();
        foreach (var root in roots.Span)
        {
            _marked.Add(root.Transducer is null && Array.IndexOf(kinds, root.Kind) >= 0 ? root with { Transducer = mark ?? "one breath" } : root);
        }

        return _marked;
    }

    /// <summary>Gates see only roots inside their ranges, so that none can be tripped, or kept silent, by nonsense.</summary>
    private Roots Sound(Roots roots)
    {
        foreach (var root in roots.Span)
        {
            if (root.IsNonsense)
            {
                Withhold(root.Kind.RangeCode);
            }
        }

        if (Withheld is null)
        {
            return roots;
        }

        _sound.Clear();
        foreach (var root in roots.Span)
        {
            if (!root.IsNonsense)
            {
                _sound.Add(root);
            }
        }

        return _sound;
    }

    private void FindMissing(IReadOnlyList<Slot> needs, Roots roots)
    {
        for (var i = 0; i < needs.Count; i++)
        {
            var slot = needs[i];
            if (roots.Has(slot))
            {
                continue;
            }

            // A slot that only another definition can fill is missing whatever that definition lacks.
            if (slot.OnlyDerived is { } derived)
            {
                FindMissing(derived.Needs, roots);
            }
            else
            {
                Withhold(slot.Missing);
                _missing.Add(slot.Name);
            }
        }
    }

    /// <summary>Follows the chain down to the roots: flags and variants of the options taken, and impossible values on the way.</summary>
    private void Follow(IReadOnlyList<Slot> needs, Roots roots)
    {
        for (var i = 0; i < needs.Count; i++)
        {
            if (roots.Chosen(needs[i]) is not { } option)
            {
                continue;
            }

            Variant ??= option.Variant;
            Raise(option.Flag);
            for (var j = 0; j < option.Terms.Count; j++)
            {
                var kind = option.Terms[j].Present(roots)!;
                if (!roots.Has(kind))
                {
                    _impossible |= IsImpossible(kind, kind.Formula!(roots));
                    Follow(kind.Needs, roots);
                }
            }
        }
    }

    private void Flag(Definition definition, Plan plan, Roots roots)
    {
        foreach (var rule in plan.FlagRules)
        {
            if (rule.Raised(roots))
            {
                Raise(rule.Flag);
            }
        }

        var (least, greatest) = definition.Usual;
        if (Value < least || Value > greatest)
        {
            Raise(Physiology.Flags.OutsideUsual);
        }
    }

    private void Raise(string? flag)
    {
        if (flag is not null && _flags.BinarySearch(flag, StringComparer.Ordinal) is var at && at < 0)
        {
            _flags.Insert(~at, flag);
        }
    }

    private static bool IsImpossible(Kind kind, double value) => !double.IsFinite(value) || value < kind.Least || value > kind.Greatest;
}
