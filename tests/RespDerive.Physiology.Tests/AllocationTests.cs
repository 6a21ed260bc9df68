namespace RespDerive.Physiology.Tests;

/// <summary>Evaluating a definition again and again leaves nothing to collect; a band, which runs only where the site names it, may. Allocation is counted, not timed.</summary>
public sealed class AllocationTests
{
    [Theory]
    [MemberData(nameof(CatalogueData.Numbers), MemberType = typeof(CatalogueData))]
    public void A_thousand_evaluations_allocate_nothing(string key)
    {
        var definition = CatalogueData.Of(key);
        var evaluation = new Evaluation();
        var reused = new Roots();
        foreach (var roots in Examples(definition))
        {
            Assert.Equal(0, Allocated(() => evaluation.Run(definition, roots)));

            // The same place for the roots of one reading after the other.
            Assert.Equal(0, Allocated(() =>
            {
                reused.Clear();
                for (var i = 0; i < roots.All.Count; i++)
                {
                    reused.Add(roots.All[i]);
                }

                evaluation.Run(definition, reused);
            }));
        }
    }

    [Fact]
    public void An_evaluation_says_what_a_computation_says()
    {
        var evaluation = new Evaluation();
        foreach (var definition in Catalogue.Shipped.All)
        {
            foreach (var roots in Examples(definition))
            {
                var computed = Computation.Of(definition, roots);
                evaluation.Run(definition, roots);
                Assert.Equal(computed.Value, evaluation.Value);
                Assert.Equal((computed.Published, computed.Uncertainty, computed.Variant, computed.Withheld), (evaluation.Published, evaluation.Uncertainty, evaluation.Variant, evaluation.Withheld));
                Assert.Equal(computed.Placement?.Code, evaluation.Placement?.Code);
                Assert.Equal(computed.Shares, evaluation.Shares.ToArray());
                Assert.Equal(computed.Flags, evaluation.Flags.ToArray());
                Assert.Equal(computed.Missing, evaluation.Missing.ToArray());
            }
        }
    }

    /// <summary>The worked examples, what trips the gates, and too little: a reason must cost no more than a number.</summary>
    private static IEnumerable<Roots> Examples(Definition definition) =>
        definition.Vectors.Select(vector => vector.Inputs).Concat(definition.Gates.Select(gate => gate.TrippedBy)).Append([])
            .Select(given => CatalogueData.WithConstants(definition, given));

    private static long Allocated(Action once)
    {
        for (var i = 0; i < 10; i++)
        {
            once();
        }

        var before = GC.GetAllocatedBytesForCurrentThread();
        for (var i = 0; i < 1000; i++)
        {
            once();
        }

        return GC.GetAllocatedBytesForCurrentThread() - before;
    }
}
