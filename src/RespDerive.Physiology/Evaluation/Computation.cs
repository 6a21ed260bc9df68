using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>What became of one computation: a number with its uncertainty, or a reason for withholding it.</summary>
public sealed record Computation
{
    /// <summary>Unrounded, canonical unit; NaN when withheld.</summary>
    public double Value { get; init; } = double.NaN;

    /// <summary>The number as published.</summary>
    public decimal Published { get; init; }

    /// <summary>Standard uncertainty, k = 1, same unit.</summary>
    public double Uncertainty { get; init; }

    /// <summary>Variance shares.</summary>
    public IReadOnlyList<Share> Shares { get; init; } = [];

    /// <summary>Flags, ordered.</summary>
    public IReadOnlyList<string> Flags { get; init; } = [];

    /// <summary>Method variant; null for the plain method.</summary>
    public string? Variant { get; init; }

    /// <summary>Reason for withholding; null when there is a value.</summary>
    public string? Withheld { get; init; }

    /// <summary>What is missing, in words, when <see cref="Withheld"/> says so.</summary>
    public IReadOnlyList<string> Missing { get; init; } = [];

    /// <summary>Evaluates a definition on its roots. Never throws for any combination of roots.</summary>
    public static Computation Of(Definition definition, Roots roots)
    {
        roots = OfOneTransducer(definition.OneTransducer, roots);
        var reasons = new List<string>();
        var missing = new List<string>();
        var formula = definition.Result.Formula!;
        var path = definition.Path(roots);
        FindMissing(path, roots, reasons, missing);
        reasons.AddRange(roots.All.Where(IsNonsense).Select(root => root.Kind.RangeCode));

        // Gates see only roots inside their ranges, so that none can be tripped, or kept silent, by nonsense.
        reasons.AddRange(Tripped(definition, reasons.Count == 0 ? roots : new Roots(roots.All.Where(root => !IsNonsense(root)))));
        if (reasons.Count > 0)
        {
            return new Computation { Withheld = reasons.MinBy(Physiology.Withheld.Rank), Missing = missing };
        }

        var steps = Chain.Steps(path, roots).ToArray();
        var value = formula(roots);
        if (IsImpossible(definition.Result, value) || steps.Any(step => !roots.Has(step.Kind) && IsImpossible(step.Kind, step.Kind.Formula!(roots))))
        {
            return new Computation { Withheld = Physiology.Withheld.Impossible };
        }

        var (uncertainty, shares) = Budget.Of(roots, formula);
        if (!double.IsFinite(uncertainty) || uncertainty > definition.GreatestRelativeUncertainty * Math.Abs(value))
        {
            return new Computation { Withheld = Physiology.Withheld.UncertaintyTooLarge };
        }

        return new Computation
        {
            Value = value,
            Published = Publication.Round(value, definition.Decimals),
            Uncertainty = uncertainty,
            Shares = shares,
            Flags = FlagsOf(definition, steps, roots, value),
            Variant = steps.Select(step => step.Option.Variant).FirstOrDefault(variant => variant is not null),
        };
    }

    /// <summary>Codes of the gates that trip.</summary>
    public static IEnumerable<string> Tripped(Definition definition, Roots roots) =>
        definition.Gates.Where(gate => gate.Trips(roots)).Select(gate => gate.Code);

    private static Roots OfOneTransducer(IReadOnlyList<Kind> kinds, Roots roots)
    {
        if (kinds.Count == 0)
        {
            return roots;
        }

        var mark = roots.All.Where(root => kinds.Contains(root.Kind)).Select(root => root.Transducer).FirstOrDefault(known => known is not null) ?? "one breath";
        return new Roots(roots.All.Select(root => root.Transducer is null && kinds.Contains(root.Kind) ? root with { Transducer = mark } : root));
    }

    private static bool IsNonsense(Root root) => root.Kind.IsCoded
        ? !double.IsInteger(root.Value) || root.Value < 0 || root.Value >= root.Kind.Codes.Count
        : !double.IsFinite(root.Value) || root.Value < root.Kind.Least || root.Value > root.Kind.Greatest;

    private static bool IsImpossible(Kind kind, double value) => !double.IsFinite(value) || value < kind.Least || value > kind.Greatest;

    private static string[] FlagsOf(Definition definition, IEnumerable<Step> steps, Roots roots, double value)
    {
        var flags = new SortedSet<string>(StringComparer.Ordinal);
        flags.UnionWith(steps.Select(step => step.Option.Flag).OfType<string>());
        flags.UnionWith(definition.FlagRules.Where(rule => rule.Raised(roots)).Select(rule => rule.Flag));
        if (value < definition.Usual.Least || value > definition.Usual.Greatest)
        {
            flags.Add(Physiology.Flags.OutsideUsual);
        }

        return [.. flags];
    }

    private static void FindMissing(IReadOnlyList<Slot> needs, Roots roots, List<string> reasons, List<string> missing)
    {
        foreach (var slot in needs.Where(slot => !roots.Has(slot)))
        {
            // A slot that only another definition can fill is missing whatever that definition lacks.
            var derived = slot.Options.Count == 1 ? slot.Kinds.SingleOrDefault(kind => kind.Formula is not null) : null;
            if (derived is null)
            {
                reasons.Add(slot.Missing);
                missing.Add(slot.Name);
            }
            else
            {
                FindMissing(derived.Needs, roots, reasons, missing);
            }
        }
    }
}
