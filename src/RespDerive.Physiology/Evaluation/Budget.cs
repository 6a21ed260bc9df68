using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>Part of the variance that one root, or one shared transducer offset, contributes.</summary>
/// <param name="Kind">The root; for a shared offset the first root that carries it.</param>
/// <param name="Transducer">Set when the part is the zero offset shared by all roots of this transducer.</param>
/// <param name="Fraction">0 to 1; the fractions of one result sum to 1.</param>
public readonly record struct Share(Kind Kind, string? Transducer, double Fraction);

/// <summary>First-order uncertainty of a function of roots (JCGM 100:2008, 5.1.2), by central differences over the whole chain.</summary>
public static class Budget
{
    /// <summary>Step of the difference as a fraction of the root's own uncertainty: small enough to be the derivative, large enough for double.</summary>
    private const double Step = 0.01;

    /// <summary>Standard uncertainty (k = 1) of <paramref name="function"/> at <paramref name="roots"/>.</summary>
    public static double Standard(Roots roots, Func<Roots, double> function) => Math.Sqrt(Variances(roots, function, null));

    /// <summary>Standard uncertainty and the share of each root.</summary>
    public static (double Standard, IReadOnlyList<Share> Shares) Of(Roots roots, Func<Roots, double> function)
    {
        var parts = new List<Share>();
        return (Standard(roots, function, parts), parts);
    }

    /// <summary>Standard uncertainty; the share of each root is put into <paramref name="parts"/>, which is emptied first.</summary>
    internal static double Standard(Roots roots, Func<Roots, double> function, List<Share> parts)
    {
        parts.Clear();
        var variance = Variances(roots, function, parts);
        for (var i = 0; i < parts.Count; i++)
        {
            parts[i] = parts[i] with { Fraction = parts[i].Fraction / variance };
        }

        return Math.Sqrt(variance);
    }

    private static double Variances(Roots roots, Func<Roots, double> function, List<Share>? parts)
    {
        var total = 0.0;
        var all = roots.Span;
        for (var i = 0; i < all.Length; i++)
        {
            var root = all[i];
            if (root.Kind.IsCoded)
            {
                continue;
            }

            var shared = SharesOffset(all, i);
            var own = shared ? root.Spread.Independent(root.Value) : root.Spread.Standard(root.Value);
            total += Add(Alone(roots, function, own, i), root.Kind, null, parts);
            if (shared && IsFirst(all, i))
            {
                total += Add(Together(roots, function, root.Spread.Offset, i), root.Kind, root.Transducer, parts);
            }
        }

        return total;
    }

    private static double Add(double variance, Kind kind, string? transducer, List<Share>? parts)
    {
        if (variance > 0)
        {
            parts?.Add(new Share(kind, transducer, variance));
        }

        return variance;
    }

    /// <summary>Variance from one root.</summary>
    private static double Alone(Roots roots, Func<Roots, double> function, double standard, int moved)
    {
        if (standard <= 0)
        {
            return 0;
        }

        roots.Move(moved, Step * standard);
        var above = function(roots);
        roots.Move(moved, -Step * standard);
        var below = function(roots);
        roots.Move(moved, 0);
        return Squared(above - below);
    }

    /// <summary>Variance from the offset of the transducer of one root, moving all its roots at once.</summary>
    private static double Together(Roots roots, Func<Roots, double> function, double standard, int first)
    {
        if (standard <= 0)
        {
            return 0;
        }

        MoveAll(roots, first, Step * standard);
        var above = function(roots);
        MoveAll(roots, first, -Step * standard);
        var below = function(roots);
        MoveAll(roots, first, 0);
        return Squared(above - below);
    }

    private static double Squared(double difference)
    {
        var contribution = difference / (2 * Step);
        return contribution * contribution;
    }

    private static void MoveAll(Roots roots, int first, double by)
    {
        var all = roots.Span;
        for (var i = first; i < all.Length; i++)
        {
            if (SameOffset(all[i], all[first]))
            {
                roots.Move(i, by);
            }
        }
    }

    private static bool SharesOffset(ReadOnlySpan<Root> all, int i)
    {
        if (all[i].Transducer is null || !all[i].Spread.Zero)
        {
            return false;
        }

        for (var j = 0; j < all.Length; j++)
        {
            if (j != i && SameOffset(all[j], all[i]))
            {
                return true;
            }
        }

        return false;
    }

    private static bool IsFirst(ReadOnlySpan<Root> all, int i)
    {
        for (var j = 0; j < i; j++)
        {
            if (SameOffset(all[j], all[i]))
            {
                return false;
            }
        }

        return true;
    }

    private static bool SameOffset(in Root a, in Root b) => a.Transducer == b.Transducer && a.Spread.Zero;
}
