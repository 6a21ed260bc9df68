using System.Globalization;
using RespDerive.Physiology.Definitions;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// First-order uncertainty against the standard deviation of draws (JCGM 101:2008, 5 to 7): at seeded points inside the usual range
/// of every definition, each root is drawn as its tolerance says, a shared zero offset once for all its roots.
/// </summary>
public sealed class MonteCarloTests
{
    private const int Draws = 20_000;
    private const int Points = 8;
    private const double Agreement = 0.1;

    /// <summary>Where the first order is not good enough. A definition or region that is not here must agree; one that is here and agrees wherever it was visited must be taken out.</summary>
    private static readonly Exception[] Exceptions =
    [
        new("driving-pressure", roots => roots.Has(StaticCompliance.Value), 0.82, 0.92, "VT over a compliance given by hand: inverse of a value known to 18 %"),
        new("elastance", roots => roots.Has(StaticCompliance.Value), 0.79, 0.90, "inverse of a compliance given by hand, known to 18 %"),
        new("static-compliance", roots => Relative("static-compliance", roots) > 0.2, 0.69, 0.92, "the pressure difference is known to more than about 18 %: the inverse of a difference near its own uncertainty"),
        new("dynamic-compliance", roots => Relative("dynamic-compliance", roots) > 0.2, 0.69, 0.92, "as static compliance"),
        new("dlco-from-membrane-and-capillary", _ => true, 0.1, 1.1, "a capillary volume given by hand is known so badly that draws come near zero, where the value has a pole"),
        new("minimum-force-rate", roots => roots.Has(StaticCompliance.Value), 0.85, 0.95, "power of a compliance given by hand, known to 18 %"),
        new("po2-imputed-pf", roots => roots[Kinds.SpO2] > 92, 0.2, 1.1, "inverse of the flat part of the dissociation curve: the true spread is up to four times the first-order one"),
        new("transpulmonary-pressure-elastance-derived", roots => !roots.Has(Kinds.EsophagealEndInspiratory), 0.45, 1.05, "ratio of two elastances given by hand"),
        new("work-rate-total", roots => roots.Has(StaticCompliance.Value), 0.83, 0.95, "inverse of a compliance given by hand, known to 18 %"),
    ];

    [Theory]
    [MemberData(nameof(CatalogueData.Numbers), MemberType = typeof(CatalogueData))]
    public void First_order_uncertainty_agrees_with_draws(string key)
    {
        var definition = CatalogueData.Of(key);
        var random = new Random(20260302);
        var points = InsideUsualRange(definition, random).Select(roots => (Roots: roots, Ratio: Ratio(definition, roots, random))).ToArray();
        var exceptions = Exceptions.Where(exception => exception.Definition == key).ToArray();

        Assert.Equal(Points, points.Length);
        Assert.All(points, point =>
        {
            var exception = exceptions.FirstOrDefault(one => one.Region(point.Roots));
            Assert.True(point.Ratio >= (exception?.Least ?? 1 - Agreement) && point.Ratio <= (exception?.Greatest ?? 1 + Agreement), Told(definition, point.Roots, point.Ratio));
        });
        foreach (var visited in exceptions.Select(exception => points.Where(point => exception.Region(point.Roots)).ToArray()).Where(visited => visited.Length > 0))
        {
            Assert.Contains(visited, point => Math.Abs(point.Ratio - 1) > Agreement);
        }
    }

    [Fact]
    public void Draws_have_the_spread_their_tolerance_says()
    {
        var random = new Random(7);
        var limit = new Root(Kinds.BarometricPressure, 760);
        var deviation = new Root(Kinds.PaCO2, 40);
        foreach (var root in new[] { limit, deviation })
        {
            var drawn = Enumerable.Range(0, 200_000).Select(_ => Draw(root, root.Spread.Standard(root.Value), random)).ToArray();
            Assert.Equal(root.Spread.Standard(root.Value), Deviation(drawn), 0.01 * root.Spread.Standard(root.Value));
        }
    }

    private static string Told(Definition definition, Roots roots, double ratio) => string.Create(CultureInfo.InvariantCulture,
        $"ratio {ratio:F3}, relative uncertainty {Relative(definition.Key, roots):F3} at {string.Join(", ", roots.All.Select(root => string.Create(CultureInfo.InvariantCulture, $"{root.Kind.Symbol} {root.Value:G5}")))}");

    private static double Relative(string key, Roots roots) => Computation.Of(CatalogueData.Of(key), roots) is var computed ? computed.Uncertainty / Math.Abs(computed.Value) : 0;

    /// <summary>
    /// Roots near the worked examples for which the value is published and usual. Where a number that is not certain enough is withheld,
    /// as a small shunt always is, any published one will do.
    /// </summary>
    private static List<Roots> InsideUsualRange(Definition definition, Random random)
    {
        var examples = definition.Vectors.Select(vector => CatalogueData.WithConstants(definition, vector.Inputs)).ToArray();
        var found = new List<Roots>();
        for (var attempt = 0; attempt < 20_000 && found.Count < Points; attempt++)
        {
            var example = examples[attempt % examples.Length];
            var transducer = found.Count % 2 == 1 && example.All.Count(root => root.Spread.Zero) > 1 ? "one" : null;
            var reach = attempt % 2 == 0 ? 0.4 : 0.4 / (1 + (attempt / 1000));
            var roots = new Roots(example.All.Select(root => root with
            {
                Value = Near(root, reach, random),
                Transducer = root.Spread.Zero ? transducer ?? (definition.OneTransducer.Contains(root.Kind) ? "one breath" : null) : null,
            }));
            var computed = Computation.Of(definition, roots);
            if (computed.Withheld is null && computed.Uncertainty > 0
                && (definition.GreatestRelativeUncertainty is not null || (computed.Value >= definition.Usual.Least && computed.Value <= definition.Usual.Greatest)))
            {
                found.Add(roots);
            }
        }

        return found;
    }

    private static double Near(Root root, double reach, Random random) => root.Kind.IsCoded || root.Assumed
        ? root.Value
        : Math.Clamp(root.Value * (1 - reach + (2 * reach * random.NextDouble())), root.Kind.Least, root.Kind.Greatest);

    private static double Ratio(Definition definition, Roots roots, Random random)
    {
        var formula = definition.Result.Formula!;
        var values = new double[Draws];
        var drawn = new Roots();
        for (var i = 0; i < Draws; i++)
        {
            var offset = (2 * random.NextDouble()) - 1;
            drawn.Clear();
            foreach (var root in roots.Span)
            {
                drawn.Add(root with { Value = root.Value + Error(root, offset, random) });
            }

            values[i] = formula(drawn);
        }

        return Computation.Of(definition, roots).Uncertainty / Deviation(values);
    }

    /// <summary>With a shared transducer the absolute part of the limit is one offset; otherwise all parts are drawn together.</summary>
    private static double Error(Root root, double offset, Random random)
    {
        if (root.Kind.IsCoded)
        {
            return 0;
        }

        return root.Transducer is not null && root.Spread.Zero
            ? (root.Spread.Absolute * offset) + Draw(root, root.Spread.Independent(root.Value), random) - root.Value
            : Draw(root, root.Spread.Standard(root.Value), random) - root.Value;
    }

    private static double Draw(Root root, double standard, Random random) => root.Spread.Rectangular
        ? root.Value + (Math.Sqrt(3) * standard * ((2 * random.NextDouble()) - 1))
        : root.Value + (standard * Normal(random));

    /// <summary>Box and Muller 1958.</summary>
    private static double Normal(Random random) => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());

    private static double Deviation(double[] values)
    {
        var mean = values.Average();
        return Math.Sqrt(values.Sum(value => (value - mean) * (value - mean)) / (values.Length - 1));
    }

    /// <summary>A definition, or a region of it, where the first order is not good enough.</summary>
    /// <param name="Definition">Key.</param>
    /// <param name="Region">Which points it covers.</param>
    /// <param name="Least">Least ratio of first-order to drawn uncertainty that was found there.</param>
    /// <param name="Greatest">Greatest ratio found.</param>
    /// <param name="Why">The reason.</param>
    private sealed record Exception(string Definition, Func<Roots, bool> Region, double Least, double Greatest, string Why);
}
