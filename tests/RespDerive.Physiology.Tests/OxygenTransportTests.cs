using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

public sealed class OxygenTransportTests
{
    private static readonly Given[] Gases =
        [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 10, "g/dL"), ("SaO2", 93, "%"), ("PaO2", 70, "mm[Hg]")];

    private static readonly Given[] Venous = [("SvO2", 65, "%"), ("PvO2", 36, "mm[Hg]")];

    /// <summary>JCGM 101:2008: the distribution is drawn, not derived. 200 000 draws give the standard deviation to about 0.2 %; what is left is curvature.</summary>
    [Fact]
    public void The_uncertainty_of_the_shunt_agrees_with_a_draw_over_its_roots()
    {
        var computed = Shunt();
        var drawn = Deviation(redrawnHemoglobin: false);
        Assert.Equal(1, computed.Computation.Uncertainty / drawn, 0.03);
    }

    /// <summary>All three contents have one haemoglobin: with one drawn for each the spread would be several times as wide.</summary>
    [Fact]
    public void The_shared_haemoglobin_cancels_and_independent_ones_would_not()
    {
        Assert.True(Deviation(redrawnHemoglobin: true) > 1.5 * Deviation(redrawnHemoglobin: false));
        Assert.InRange(Shunt().Inputs.Single(input => input.Kind == Kinds.Hemoglobin).Share, 0, 0.02);
    }

    [Fact]
    public void The_shunt_from_its_parts_is_the_shunt_from_its_contents()
    {
        var shunt = Shunt();
        var parts = shunt.Intermediates.ToDictionary(part => part.Kind.Symbol, part => part.Value);
        Assert.Equal((parts["CcO2"] - parts["CaO2"]) / (parts["CcO2"] - parts["CvO2"]), shunt.Computation.Value, 1e-12);
    }

    [Fact]
    public void A_shunt_near_zero_is_too_uncertain_to_publish() => Assert.Equal(Withheld.UncertaintyTooLarge,
        ByHand.Compute(CatalogueData.Of("shunt-fraction"), [("FiO2", 0.6, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"), ("Hb", 14, "g/dL"), ("SaO2", 99.7, "%"), ("PaO2", 350, "mm[Hg]"), ("SvO2", 75, "%"), ("PvO2", 42, "mm[Hg]")]).Computation.Withheld);

    [Fact]
    public void What_cannot_bind_is_taken_from_every_content_and_leaves_the_shunt_alone()
    {
        var without = Shunt().Computation;
        var with = ByHand.Compute(CatalogueData.Of("shunt-fraction"), [.. Gases, .. Venous, ("COHb", 5, "%"), ("MetHb", 1, "%")]).Computation;
        Assert.Contains(Flags.DyshemoglobinUnknown, without.Flags);
        Assert.DoesNotContain(Flags.DyshemoglobinUnknown, with.Flags);
        Assert.InRange(with.Value - without.Value, -0.01, 0.01); // only the dissolved parts weigh differently
        Assert.NotEqual(without.Value, with.Value);
    }

    [Fact]
    public void A_fraction_of_all_haemoglobin_is_not_reduced_again()
    {
        var functional = Content(("SaO2", 95, "%"), ("COHb", 6, "%"), ("MetHb", 2, "%"));
        var fractional = Content(("FO2Hb", 95 * 0.92, "%"), ("COHb", 6, "%"), ("MetHb", 2, "%"));
        Assert.Equal(functional.Value, fractional.Value, 1e-9);
        Assert.Equal(functional.Value, Content(("SaO2", 95, "%"), ("FO2Hb", 95 * 0.92, "%")).Value, 1e-9); // the CO-oximeter comes first
    }

    [Fact]
    public void One_dyshaemoglobin_known_is_used_and_the_other_flagged()
    {
        var computed = Content(("SaO2", 95, "%"), ("COHb", 10, "%"));
        Assert.Equal((1.34 * 12 * 0.95 * 0.9) + (0.003 * 80), computed.Value, 1e-9);
        Assert.Contains(Flags.DyshemoglobinUnknown, computed.Flags);
    }

    [Fact]
    public void A_content_by_hand_names_the_blood_it_is_of()
    {
        var venous = ByHand.Compute(CatalogueData.Of("oxygen-content"), [("Hb", 15, "g/dL"), ("SvO2", 70, "%"), ("PvO2", 40, "mm[Hg]")]).Computation;
        Assert.Equal("mixed-venous", venous.Variant);
        Assert.Null(ByHand.Compute(CatalogueData.Of("oxygen-content"), [("Hb", 15, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("COHb", 1, "%"), ("MetHb", 1, "%")]).Computation.Variant);
    }

    [Fact]
    public void Venous_values_never_stand_in_for_arterial_ones() => Assert.Equal(Withheld.InputMissing,
        ByHand.Compute(CatalogueData.Of("oxygen-delivery"), [("CO", 5, "L/min"), ("Hb", 12, "g/dL"), .. Venous]).Computation.Withheld);

    [Fact]
    public void An_unmeasured_venous_tension_is_assumed_and_flagged()
    {
        var computed = ByHand.Compute(CatalogueData.Of("oxygen-content-venous"), [("Hb", 12, "g/dL"), ("SvO2", 70, "%")]).Computation;
        Assert.Equal((1.34 * 12 * 0.7) + (0.003 * 40), computed.Value, 1e-9);
        Assert.Contains(Flags.VenousTensionAssumed, computed.Flags);
    }

    [Fact]
    public void The_constants_stand_in_the_result_as_assumed()
    {
        var assumed = ByHand.Compute(CatalogueData.Of("oxygen-content"), [("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]")]).Inputs.Where(input => input.Assumed);
        Assert.Equal(["dyshemoglobin", "huefner", "oxygen-solubility"], assumed.Select(input => input.Kind.Key).Order(StringComparer.Ordinal));
    }

    private static ByHand Shunt() => ByHand.Compute(CatalogueData.Of("shunt-fraction"), [.. Gases, .. Venous]);

    private static Computation Content(params Given[] given) =>
        ByHand.Compute(CatalogueData.Of("oxygen-content"), [("Hb", 12, "g/dL"), ("PaO2", 80, "mm[Hg]"), .. given]).Computation;

    /// <summary>Standard deviation of the shunt over seeded normal draws of every root; the arithmetic is written out again here.</summary>
    private static double Deviation(bool redrawnHemoglobin)
    {
        const int Draws = 200_000;
        var random = new Random(20_240_611);
        double Normal() => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
        var (sum, squares) = (0.0, 0.0);
        var roots = Shunt().Inputs.ToDictionary(input => input.Kind.Symbol, input => (input.Value, Standard: input.Kind.Tolerance.Standard(input.Value)));
        double Draw(string symbol) => roots[symbol].Value + (roots[symbol].Standard * Normal());
        for (var i = 0; i < Draws; i++)
        {
            var (fio2, pressure, paco2, r, pao2, pvo2) = (Draw("FiO2"), Draw("PB"), Draw("PaCO2"), Draw("R"), Draw("PaO2"), Draw("PvO2"));
            var (sao2, svo2, bound, misfit) = (Draw("SaO2") / 100, Draw("SvO2") / 100, 1.34 * (1 - (Draw("dysHb") / 100)), Draw("dSsev") / 100);
            double[] hemoglobin = [Draw("Hb"), Draw("Hb"), Draw("Hb")];
            if (!redrawnHemoglobin)
            {
                hemoglobin = [hemoglobin[0], hemoglobin[0], hemoglobin[0]];
            }

            var alveolar = (fio2 * (pressure - 47)) - (paco2 * (fio2 + ((1 - fio2) / r)));
            var capillary = (bound * hemoglobin[0] * ((1 / ((23400 / (Math.Pow(alveolar, 3) + (150 * alveolar))) + 1)) + misfit)) + (0.003 * alveolar);
            var arterial = (bound * hemoglobin[1] * sao2) + (0.003 * pao2);
            var venous = (bound * hemoglobin[2] * svo2) + (0.003 * pvo2);
            var shunt = (capillary - arterial) / (capillary - venous);
            sum += shunt;
            squares += shunt * shunt;
        }

        return Math.Sqrt((squares / Draws) - (sum / Draws * (sum / Draws)));
    }
}
