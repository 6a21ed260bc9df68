using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>Values that are exact on paper are published exactly: classes are cut at 100, 200, 300 (Berlin definition, JAMA 2012;307:2526) and at round pressures.</summary>
public sealed class ExactnessTests
{
    [Theory]
    [InlineData(100)]
    [InlineData(200)]
    [InlineData(300)]
    public void A_ratio_that_is_exact_on_paper_is_published_exactly(int ratio)
    {
        var definition = CatalogueData.Of("pf-ratio");
        var pairs = 0;
        for (var fio2 = 0.21m; fio2 <= 1m; fio2 += 0.001m)
        {
            var computed = Computation.Of(definition, new Roots([new Root(Kinds.PaO2, (double)(ratio * fio2)), new Root(Kinds.FiO2, (double)fio2)]));
            Assert.Equal(ratio, computed.Published);
            Assert.Equal(ratio, Publication.Round(computed.Value, 9));
            pairs++;
        }

        Assert.Equal(791, pairs);
    }

    [Fact]
    public void Three_hundred_and_one_pressures_fifteen_apart_are_published_as_fifteen()
    {
        var definition = CatalogueData.Of("driving-pressure");
        for (var tenths = 0; tenths <= 300; tenths++)
        {
            var peep = tenths / 10m;
            var computed = Computation.Of(definition, new Roots([new Root(Kinds.Plateau, (double)(peep + 15)), new Root(Kinds.PeepTotal, (double)peep)]));
            Assert.Equal(15.0m, computed.Published);
            Assert.Equal("15.0", Publication.Text(computed.Published, definition.Decimals));
        }
    }

    [Theory]
    [InlineData(0.5, 0, "1")]
    [InlineData(-0.5, 0, "-1")]
    [InlineData(2.675, 2, "2.68")]
    [InlineData(0.0449999999999, 2, "0.05")]
    public void Rounding_is_half_away_from_zero_after_the_binary_noise_is_gone(double value, int decimals, string text) =>
        Assert.Equal(text, Publication.Text(Publication.Round(value, decimals), decimals));
}
