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
        var variance = Variances(roots, function, parts);
        return (Math.Sqrt(variance), variance > 0 ? [.. parts.Select(part => part with { Fraction = part.Fraction / variance })] : []);
    }

    private static double Variances(Roots roots, Func<Roots, double> function, List<Share>? parts)
    {
        var total = 0.0;
        var all = roots.All;
        for (var i = 0; i < all.Count; i++)
        {
            var root = all[i];
            if (root.Kind.IsCoded)
            {
                continue;
            }

            var shared = SharesOffset(all, i);
            var own = shared ? root.Spread.Independent(root.Value) : root.Spread.Standard(root.Value);
            total += Add(Squared(roots, function, own, [i]), root.Kind, null, parts);
            if (shared && IsFirst(all, i))
            {
                var together = Enumerable.Range(0, all.Count).Where(j => all[j].Transducer == root.Transducer && all[j].Spread.Zero).ToArray();
                total += Add(Squared(roots, function, root.Spread.Offset, together), root.Kind, root.Transducer, parts);
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

    private static double Squared(Roots roots, Func<Roots, double> function, double standard, ReadOnlySpan<int> moved)
    {
        if (standard <= 0)
        {
            return 0;
        }

        Span<double> kept = stackalloc double[moved.Length];
        for (var i = 0; i < moved.Length; i++)
        {
            kept[i] = roots.All[moved[i]].Value;
        }

        var above = Moved(roots, function, moved, kept, Step * standard);
        var below = Moved(roots, function, moved, kept, -Step * standard);
        for (var i = 0; i < moved.Length; i++)
        {
            roots.Restore(moved[i], kept[i]);
        }

        var contribution = (above - below) / (2 * Step);
        return contribution * contribution;
    }

    private static double Moved(Roots roots, Func<Roots, double> function, ReadOnlySpan<int> moved, ReadOnlySpan<double> from, double by)
    {
        for (var i = 0; i < moved.Length; i++)
        {
            roots.Restore(moved[i], from[i] + by);
        }

        return function(roots);
    }

    private static bool SharesOffset(IReadOnlyList<Root> all, int i)
    {
        if (all[i].Transducer is null || !all[i].Spread.Zero)
        {
            return false;
        }

        for (var j = 0; j < all.Count; j++)
        {
            if (j != i && all[j].Transducer == all[i].Transducer && all[j].Spread.Zero)
            {
                return true;
            }
        }

        return false;
    }

    private static bool IsFirst(IReadOnlyList<Root> all, int i)
    {
        for (var j = 0; j < i; j++)
        {
            if (all[j].Transducer == all[i].Transducer && all[j].Spread.Zero)
            {
                return false;
            }
        }

        return true;
    }
}
