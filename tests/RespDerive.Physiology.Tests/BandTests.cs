namespace RespDerive.Physiology.Tests;

/// <summary>Coded results: the code comes from the posted number, the probabilities from its uncertainty.</summary>
public sealed class BandTests
{
    /// <summary>Cut-points of the Berlin definition, JAMA 2012;307:2526, table 3, on the posted number, which has no decimals.</summary>
    [Theory]
    [InlineData(300.4, "mild")]
    [InlineData(300.5, "none")]
    [InlineData(200.4, "moderate")]
    [InlineData(200.5, "mild")]
    [InlineData(100.4, "severe")]
    [InlineData(100.5, "moderate")]
    public void A_band_is_cut_on_the_posted_number(double pf, string code) =>
        Assert.Equal(code, Ards(("PF", pf, "mm[Hg]"), ("PEEP", 8, "cm[H2O]")).Placement!.Code);

    [Theory]
    [InlineData("invasive ventilation", "moderate", "global-2023")]
    [InlineData("high-flow oxygen", "met", "global-2023")]
    [InlineData("non-invasive ventilation", "met", "global-2023")]
    public void The_kind_of_support_decides_whether_there_is_a_severity(string support, string code, string criterion)
    {
        var placed = Ards(("SF", 200, "%"), ("SpO2", 94, "%"), ("support", support));
        Assert.Equal(code, placed.Placement!.Code);
        Assert.Equal(criterion, placed.Variant);
    }

    [Fact]
    public void Criteria_that_are_named_apply()
    {
        Given[] both = [("PF", 150, "mm[Hg]"), ("SF", 200, "%"), ("SpO2", 94, "%"), ("PEEP", 8, "cm[H2O]"), ("support", "invasive ventilation")];
        Assert.Equal("berlin-2012", Ards(both).Variant);
        Assert.Equal("global-2023", Ards([.. both, ("criteria", "global-2023")]).Variant);
        var limited = Ards([.. both, ("criteria", "global-2023-limited-resources")]);
        Assert.Equal(("global-2023-limited-resources", "met", "sf-ratio"), (limited.Variant, limited.Placement!.Code, limited.Placement.Criterion.Number.Key));
    }

    [Fact]
    public void Two_ratios_at_hand_are_no_contradiction_and_the_blood_gas_counts()
    {
        var placed = Ards(("PaO2", 75, "mm[Hg]"), ("FiO2", 0.5, "1"), ("SpO2", 94, "%"), ("PEEP", 8, "cm[H2O]"));
        Assert.Equal(("moderate", 150m), (placed.Placement!.Code, placed.Placement.Posted));
        Assert.Throws<UnusableRequestException>(() => Ards(("PF", 150, "mm[Hg]"), ("PaO2", 75, "mm[Hg]"), ("FiO2", 0.5, "1"), ("PEEP", 8, "cm[H2O]")));
    }

    [Fact]
    public void Criteria_that_are_named_do_not_fall_back() =>
        Assert.Equal(Withheld.InputMissing, Ards(("SF", 200, "%"), ("SpO2", 94, "%"), ("PEEP", 8, "cm[H2O]"), ("criteria", "berlin-2012")).Withheld);

    /// <summary>Berlin definition, footnote of table 3: above 1000 m the ratio times PB/760.</summary>
    [Theory]
    [InlineData(760.0, "mild", false)]
    [InlineData(680.0, "mild", false)]
    [InlineData(560.0, "moderate", false)]
    [InlineData(null, "mild", true)]
    public void Above_a_thousand_metres_the_ratio_is_corrected(double? pressure, string code, bool flagged)
    {
        Given[] given = [("PF", 220, "mm[Hg]"), ("PEEP", 8, "cm[H2O]")];
        var placed = Ards(pressure is { } known ? [.. given, ("PB", known, "mm[Hg]")] : given);
        Assert.Equal(code, placed.Placement!.Code);
        Assert.Equal(flagged, placed.Flags.Contains(Flags.AltitudeUnknown));
    }

    [Fact]
    public void A_number_on_a_cut_point_is_equally_likely_on_either_side()
    {
        var bands = Ards(("PF", 200.5, "mm[Hg]"), ("PEEP", 8, "cm[H2O]"));
        Assert.Equal(0.5, Probability(bands, "severe") + Probability(bands, "moderate"), 1e-6);
        Assert.Equal(1, bands.Placement!.Bands.Sum(band => band.Probability), 1e-12);
        Assert.Contains(Flags.BandUncertain, bands.Flags);
        Assert.DoesNotContain(Flags.BandUncertain, Ards(("PF", 150, "mm[Hg]"), ("PEEP", 8, "cm[H2O]")).Flags);
    }

    /// <summary>Normal distribution, tables of any textbook: 84.13 % below one, 97.72 % below two standard deviations.</summary>
    [Theory]
    [InlineData(0, 0.5)]
    [InlineData(1, 0.841345)]
    [InlineData(-1, 0.158655)]
    [InlineData(2, 0.977250)]
    [InlineData(-3, 0.001350)]
    [InlineData(double.PositiveInfinity, 1)]
    [InlineData(double.NegativeInfinity, 0)]
    public void The_normal_distribution_is_that_of_the_tables(double z, double below) => Assert.Equal(below, Normal.Below(z), 1e-6);

    [Fact]
    public void The_probabilities_rest_on_the_uncertainty_of_the_number()
    {
        // One standard uncertainty above the cut-point at 200.5: 15.87 % lie below it.
        var given = ByHand.Compute(CatalogueData.Of("pf-ratio"), [("PaO2", 110, "mm[Hg]"), ("FiO2", 0.5, "1")]).Computation;
        var placed = Ards(("PaO2", 110, "mm[Hg]"), ("FiO2", 0.5, "1"), ("PEEP", 8, "cm[H2O]"));
        Assert.Equal(given.Uncertainty, placed.Placement!.Uncertainty, 1e-9);
        Assert.Equal(Normal.Below((200.5 - 220) / given.Uncertainty) - Normal.Below((100.5 - 220) / given.Uncertainty), Probability(placed, "moderate"), 1e-9);
    }

    [Theory]
    [InlineData(7.94, "mild")]
    [InlineData(7.95, "moderate")]
    [InlineData(15.94, "moderate")]
    [InlineData(15.95, "severe")]
    public void The_index_of_a_child_is_cut_on_the_posted_number(double index, string code) =>
        Assert.Equal(code, ByHand.Compute(CatalogueData.Of("pards-severity-band"), [("OI", index, "1")]).Computation.Placement!.Code);

    [Fact]
    public void Bands_run_only_where_the_site_names_them_and_never_speak_of_a_diagnosis() => Assert.All(
        Catalogue.Shipped.All.OfType<Classification>(), bands =>
        {
            Assert.False(bands.OnByDefault);
            Assert.Contains("never a diagnosis", bands.Caution, StringComparison.Ordinal);
            Assert.All(bands.Result.Codes, code => Assert.StartsWith("Oxygenation criterion", bands.Text(code), StringComparison.Ordinal));
            Assert.All(bands.Criteria, criterion => Assert.Equal(criterion.Cuts.Count + 1, criterion.Codes.Count));
            Assert.All(bands.Criteria.SelectMany(criterion => criterion.Codes), code => Assert.Contains(code, bands.Result.Codes));
        });

    [Fact]
    public void What_the_record_never_calls_for_has_no_anchor() =>
        Assert.All(Catalogue.Shipped.All, definition => Assert.Equal(definition.ByHandOnly, definition.Calling.Anchors.Count == 0));

    private static double Probability(Computation placed, string code) => placed.Placement!.Bands.Single(band => band.Code == code).Probability;

    private static Computation Ards(params Given[] given) => ByHand.Compute(CatalogueData.Of("ards-oxygenation-band"), given).Computation;
}
