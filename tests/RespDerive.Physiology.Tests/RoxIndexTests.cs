using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

public sealed class RoxIndexTests
{
    private static readonly Root[] Readings = [new(Kinds.SpO2, 92), new(Kinds.FiO2, 0.5), new(Kinds.RespiratoryRate, 30)];

    [Fact]
    public void Readings_without_a_kind_of_support_are_withheld_as_not_on_high_flow() =>
        Assert.Equal(Withheld.NotOnHighFlow, Computation.Of(CatalogueData.Of("rox-index"), new Roots(Readings)).Withheld);

    [Theory]
    [InlineData("high-flow oxygen", null)]
    [InlineData("low-flow oxygen", Withheld.NotOnHighFlow)]
    [InlineData("none", Withheld.NotOnHighFlow)]
    public void Only_high_flow_support_gives_a_value(string support, string? withheld) => Assert.Equal(withheld,
        Computation.Of(CatalogueData.Of("rox-index"), new Roots([.. Readings, new Root(Kinds.Support, Kinds.Support.Codes.ToList().IndexOf(support))])).Withheld);

    [Fact]
    public void By_hand_the_support_is_taken_on_trust_and_the_result_says_so()
    {
        var computed = ByHand.Compute(CatalogueData.Of("rox-index"), [("SpO2", 92, "%"), ("FiO2", 0.5, "1"), ("RR", 30, "/min")]);
        Assert.Contains(Flags.SupportUnconfirmed, computed.Computation.Flags);
        Assert.Equal("high-flow oxygen", computed.Inputs.Single(input => input.Kind == Kinds.HighFlowTaken).Code);
        Assert.DoesNotContain(Flags.SupportUnconfirmed, ByHand.Compute(CatalogueData.Of("rox-index"),
            [("SpO2", 92, "%"), ("FiO2", 0.5, "1"), ("RR", 30, "/min"), ("support", "high-flow oxygen")]).Computation.Flags);
    }
}
