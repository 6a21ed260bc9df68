using CsCheck;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

public sealed class PropertyTests
{
    [Theory]
    [MemberData(nameof(CatalogueData.Definitions), MemberType = typeof(CatalogueData))]
    public void Whatever_is_given_a_number_is_inside_the_hard_limits_or_there_is_none(string key)
    {
        var definition = CatalogueData.Of(key);
        var kinds = Chain.Slots(definition).SelectMany(slot => slot.Kinds).Concat(definition.Watched)
            .Concat(definition.Gates.SelectMany(gate => gate.ReadsByHand)).Distinct().ToArray();
        var published = 0;
        Gen.Select(Gen.Bool, Gen.Bool.Array[kinds.Length], Gen.Select(Gen.Int[0, 11], Gen.Double[0, 1]).Array[kinds.Length]).Sample(
            (plausible, present, draws) =>
            {
                // Half of the draws hold nothing but plausible values, so that definitions with many inputs get to publish at all.
                var roots = new Roots(kinds.Select((kind, i) => new Root(kind, Draw(kind, plausible ? (11, draws[i].Item2) : draws[i]))).Where((_, i) => present[i] || kinds[i].Assumed is not null));
                var computed = Computation.Of(definition, roots);
                if (computed.Withheld is not null)
                {
                    return double.IsNaN(computed.Value) && Withheld.Rank(computed.Withheld) < int.MaxValue;
                }

                published++;
                return computed.Value >= definition.Result.Least && computed.Value <= definition.Result.Greatest
                    && double.IsFinite(computed.Uncertainty) && Math.Abs(computed.Shares.Sum(share => share.Fraction) - 1) < 1e-9
                    && (double)computed.Published >= definition.Result.Least - 1 && roots.All.All(root => root.Kind.IsCoded || (root.Value >= root.Kind.Least && root.Value <= root.Kind.Greatest));
            },
            iter: 20_000,
            seed: "0000KOJ0mLW2",
            threads: 1);
        Assert.NotEqual(0, published);
    }

    /// <summary>Mostly inside the plausible range, now and then on its border, outside, or no number at all.</summary>
    private static double Draw(Kind kind, (int Sort, double At) draw)
    {
        if (kind.IsCoded)
        {
            return draw.Sort == 0 ? double.NaN : draw.Sort == 1 ? kind.Codes.Count : Math.Floor(draw.At * kind.Codes.Count * 0.999);
        }

        // A constant is there even when nobody gives it, mostly with its assumed value.
        if (kind.Assumed is { } assumed && draw.Sort > 5)
        {
            return assumed;
        }

        var greatest = Math.Min(kind.Greatest, 1e6);
        return draw.Sort switch
        {
            0 => kind.Least,
            1 => greatest,
            2 => draw.At * 1e4 - 5e3,
            3 => draw.At < 0.3 ? double.NaN : draw.At < 0.6 ? double.PositiveInfinity : 0,
            _ => kind.Least + (draw.At * (greatest - kind.Least)),
        };
    }
}
