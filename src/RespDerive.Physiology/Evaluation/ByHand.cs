using System.Globalization;
using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology;

/// <summary>A request that cannot be computed as it stands: an unknown name, a wrong unit, a value given twice.</summary>
public sealed class UnusableRequestException(string message) : Exception(message);

/// <summary>One value a computation by hand rests on.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="Value">Canonical unit, or the index of the code.</param>
/// <param name="Given">As typed; null when assumed.</param>
/// <param name="Share">Share of the variance.</param>
/// <param name="CheckedOnly">True for what only gates and flag rules looked at.</param>
public sealed record HandInput(Kind Kind, double Value, string? Given, double Share, bool CheckedOnly)
{
    /// <summary>True for a default nobody gave.</summary>
    public bool Assumed => Given is null;

    /// <summary>The code of a coded kind; null for a quantity.</summary>
    public string? Code => Kind.IsCoded ? Kind.Codes[(int)Value] : null;
}

/// <summary>A definition computed from named values, without a record, a time or a patient.</summary>
/// <param name="Definition">The definition.</param>
/// <param name="Computation">The number or the reason for withholding it.</param>
/// <param name="Inputs">What it rests on.</param>
/// <param name="Unused">Names of known values that had no part in it, as typed.</param>
public sealed record ByHand(Definition Definition, Computation Computation, IReadOnlyList<HandInput> Inputs, IReadOnlyList<string> Unused)
{
    /// <summary>Results of other definitions computed on the way, unrounded, in their canonical units; empty when withheld.</summary>
    public IReadOnlyList<(Kind Kind, double Value)> Intermediates { get; init; } = [];

    /// <summary>Computes a definition from values given by name.</summary>
    /// <exception cref="UnusableRequestException">The request itself is wrong; a value merely out of range is withheld instead.</exception>
    public static ByHand Compute(Definition definition, IEnumerable<Given> given, Catalogue? catalogue = null)
    {
        var vocabulary = new Vocabulary(definition, catalogue ?? Catalogue.Shipped);
        var named = Read(given, vocabulary);
        var roots = new Roots(named.Values.Where(entry => vocabulary.Usable.Contains(entry.Root.Kind)).Select(entry => entry.Root));
        RefuseDoubles(definition, roots, named);
        roots = WithDefaults(definition, roots);

        var computation = Computation.Of(definition, roots);
        var chain = Needed(definition, roots, computation);
        var used = chain.Concat(definition.Watched).Concat(definition.Gates.SelectMany(gate => gate.ReadsByHand)).ToHashSet();
        var shares = computation.Shares.Where(share => share.Transducer is null).ToDictionary(share => share.Kind, share => share.Fraction);
        return new ByHand(definition, computation,
            [.. roots.All.Where(root => used.Contains(root.Kind)).Select(root =>
                new HandInput(root.Kind, root.Value, root.Assumed ? null : named[root.Kind].Given.Typed, shares.GetValueOrDefault(root.Kind), !chain.Contains(root.Kind)))],
            [.. named.Values.Where(entry => !used.Contains(entry.Root.Kind)).Select(entry => entry.Given.Name)])
        {
            Intermediates = computation.Withheld is null ? [.. chain.Where(kind => kind.Formula is not null && !roots.Has(kind)).Select(kind => (kind, roots[kind]))] : [],
        };
    }

    private static Dictionary<Kind, (Given Given, Root Root)> Read(IEnumerable<Given> given, Vocabulary vocabulary)
    {
        var named = new Dictionary<Kind, (Given Given, Root Root)>();
        foreach (var one in given)
        {
            var kind = vocabulary.Find(one.Name);
            if (one.Code == "missing")
            {
                continue;
            }

            if (!named.TryAdd(kind, (one, new Root(kind, kind.IsCoded ? CodeOf(one, kind) : NumberOf(one, kind), one.Transducer))))
            {
                throw new UnusableRequestException($"{kind.Name} is given twice, as {named[kind].Given.Name} and {one.Name}.");
            }
        }

        return named;
    }

    private static double NumberOf(Given given, Kind kind)
    {
        if (given.Value is not { } value)
        {
            throw new UnusableRequestException($"{given.Name}: '{given.Code}' is not a number.");
        }

        return Ucum.TryConvert(value, given.Unit ?? kind.Unit!, kind.Unit!, out var converted)
            ? (double)converted
            : throw new UnusableRequestException($"{given.Name}: the unit '{given.Unit}' is not one of {string.Join(", ", Ucum.Alike(kind.Unit!))}.");
    }

    private static double CodeOf(Given given, Kind kind)
    {
        var index = kind.Codes.ToList().IndexOf(given.Typed);
        return index >= 0
            ? index
            : throw new UnusableRequestException(string.Create(CultureInfo.InvariantCulture, $"{given.Name}: '{given.Typed}' is not one of {string.Join(", ", kind.Codes)}."));
    }

    /// <summary>An intermediate value that is given and could be computed as well leaves open which of the two is meant.</summary>
    private static void RefuseDoubles(Definition definition, Roots roots, Dictionary<Kind, (Given Given, Root Root)> named)
    {
        var complete = WithDefaults(definition, roots);
        foreach (var slot in Chain.Slots(definition))
        {
            var given = slot.Kinds.FirstOrDefault(roots.Has);
            var computable = slot.Kinds.Where(kind => !slot.Alternatives || roots.Has(kind)).FirstOrDefault(kind => kind.Formula is not null && kind.ComputableFrom(complete));
            given = slot.Alternatives ? computable : given;
            if (given is not null && computable is not null)
            {
                throw new UnusableRequestException($"{given.Name} ({named[given].Given.Name}) is given and can be computed from other values given; leave one of them out.");
            }
        }
    }

    private static Roots WithDefaults(Definition definition, Roots roots) => new(roots.All.Concat(
        Chain.Slots(definition).SelectMany(slot => slot.Kinds).Distinct().Where(kind => kind.Assumed is not null && !roots.Has(kind))
            .Select(kind => new Root(kind, kind.Assumed!.Value, Assumed: true))));

    /// <summary>Kinds the formula rests on: the chain when it is complete, anything it could use when it is not.</summary>
    private static HashSet<Kind> Needed(Definition definition, Roots roots, Computation computation) => computation.Missing.Count == 0
        ? [.. Chain.Steps(definition.Plan.Path(roots), roots).Select(step => step.Kind)]
        : [.. Chain.Slots(definition).SelectMany(slot => slot.Kinds)];
}
