using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>A number that changes gets a new revision; the old one stays beside it, frozen and computable.</summary>
public sealed class RevisionTests
{
    private static readonly Catalogue Catalogue = new(typeof(Catalogue).Assembly, typeof(RevisionTests).Assembly);

    [Fact]
    public void The_key_alone_means_the_latest_revision()
    {
        Assert.IsType<Second>(Catalogue.Find("invented-pressure"));
        Assert.Equal(2, Assert.Single(Catalogue.All, definition => definition.Key == "invented-pressure").Revision);
    }

    [Fact]
    public void A_frozen_revision_is_still_computable_by_key_and_revision()
    {
        Assert.Equal(24, Compute(1).Value);
        Assert.Equal(14, Compute(2).Value);
        Assert.Null(Catalogue.Find("invented-pressure", 3));
    }

    [Fact]
    public void Two_definitions_of_one_key_and_revision_are_refused() =>
        Assert.Throws<InvalidOperationException>(() => new Catalogue(typeof(Catalogue).Assembly, typeof(Catalogue).Assembly));

    [Fact]
    public void Every_revision_is_kept_for_the_contract()
    {
        Assert.Equal([1, 2], Catalogue.Revisions.Where(definition => definition.Key == "invented-pressure").Select(definition => definition.Revision));
        Assert.Superset(Catalogue.Shipped.All.ToHashSet(), Catalogue.Shipped.Revisions.ToHashSet());
    }

    private static Computation Compute(int revision) =>
        ByHand.Compute(Catalogue.Find("invented-pressure", revision)!, [("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")], Catalogue).Computation;

    private abstract class Invented : Definition
    {
        public override string Purpose => "Invented";

        public override string Summary => "Invented for this test.";

        public override string Assumptions => "None.";

        public override string Caution => "Means nothing.";

        public override int Decimals => 1;

        public override (double Least, double Greatest) Usual => (0, 100);

        public override Calling Calling => new([Kinds.Plateau]);

        public override IReadOnlyList<Citation> Citations => [new("Invented")];

        public override IReadOnlyList<Vector> Vectors => [];

        protected static Kind Of(Func<Roots, double> formula, params Slot[] needs) =>
            Kind.Derived("invented-pressure", "IP", "invented pressure", "cm[H2O]", 0, 100, Tolerance.None, needs, formula);
    }

    /// <summary>Frozen: the plateau pressure itself.</summary>
    private sealed class First : Invented
    {
        private static readonly Kind Value = Of(x => x[Slots.Plateau], Slots.Plateau);

        public override Kind Result => Value;

        public override string Equation => "IP = Pplat";
    }

    /// <summary>Now above total PEEP.</summary>
    private sealed class Second : Invented
    {
        private static readonly Kind Value = Of(x => x[Slots.Plateau] - x[Slots.Peep], Slots.Plateau, Slots.Peep);

        public override Kind Result => Value;

        public override int Revision => 2;

        public override string Equation => "IP = Pplat − PEEPtot";
    }
}
