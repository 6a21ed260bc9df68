using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>First-order propagation against sums done on paper (JCGM 100:2008, 5.1.2).</summary>
public sealed class UncertaintyTests
{
    [Fact]
    public void Of_the_ratio_of_tension_to_fraction() =>
        Assert.Equal(9.92144, Of("pf-ratio", (Kinds.PaO2, 75, 3.75), (Kinds.FiO2, 0.5, 0.02165)).Uncertainty, 0.05);

    [Fact]
    public void Of_the_driving_pressure_without_a_shared_offset() =>
        Assert.Equal(2.21923, Of("driving-pressure", (Kinds.Plateau, 24, 1.73), (Kinds.Peep, 10, 1.39)).Uncertainty, 0.005);

    [Fact]
    public void Of_the_static_compliance() =>
        Assert.Equal(5.47176, Of("static-compliance", (Kinds.TidalVolumeExpired, 420, 38.7), (Kinds.Plateau, 24, 1.71), (Kinds.Peep, 10, 1.39)).Uncertainty, 0.01);

    [Fact]
    public void Of_the_alveolar_arterial_difference_on_air() => Assert.Equal(4.32745, OnAir().Uncertainty, 0.005);

    [Fact]
    public void The_assumed_exchange_ratio_has_the_share_its_sensitivity_gives()
    {
        // d(AaDO2)/dR = PaCO2·(1 − FiO2)/R²; d/dPaCO2 = −(FiO2 + (1 − FiO2)/R); d/dPB = FiO2; d/dPaO2 = −1.
        var computed = OnAir();
        var parts = new Dictionary<Kind, double>
        {
            [Kinds.RespiratoryQuotient] = 40 * 0.79 / 0.64 * 0.0577,
            [Kinds.PaCO2] = (0.21 + (0.79 / 0.8)) * 1,
            [Kinds.BarometricPressure] = 0.21 * 2,
            [Kinds.PaO2] = 3,
        };
        var total = parts.Values.Sum(part => part * part);
        Assert.Equal(parts.Count, computed.Shares.Count);
        Assert.All(computed.Shares, share => Assert.Equal(parts[share.Kind] * parts[share.Kind] / total, share.Fraction, 1e-6));
        Assert.Equal(1, computed.Shares.Sum(share => share.Fraction), 1e-12);
    }

    [Fact]
    public void The_sensitivity_to_the_fraction_is_the_full_equations_one()
    {
        // d(AaDO2)/dFiO2 = PB − PH2O − PaCO2·(1 − 1/R)
        var computed = Of("aa-gradient", (Kinds.FiO2, 0.21, 0.01), (Kinds.BarometricPressure, 760, 0), (Kinds.WaterVapour, 47, 0),
            (Kinds.PaCO2, 40, 0), (Kinds.RespiratoryQuotient, 0.8, 0), (Kinds.PaO2, 75, 0));
        Assert.Equal((760 - 47 - (40 * (1 - (1 / 0.8)))) * 0.01, computed.Uncertainty, 1e-6);
    }

    [Fact]
    public void The_zero_offset_of_one_transducer_cancels_in_a_difference()
    {
        var definition = CatalogueData.Of("driving-pressure");
        var apart = Computation.Of(definition, new Roots([new Root(Kinds.Plateau, 24), new Root(Kinds.PeepTotal, 10)]));
        var shared = Computation.Of(definition, new Roots([new Root(Kinds.Plateau, 24, "vent"), new Root(Kinds.PeepTotal, 10, "vent")]));

        Assert.Equal(Math.Sqrt(Math.Pow((2 + 0.96) / Math.Sqrt(3), 2) + Math.Pow((2 + 0.4) / Math.Sqrt(3), 2)), apart.Uncertainty, 1e-9);
        Assert.Equal(Math.Sqrt((0.96 * 0.96) + (0.4 * 0.4)) / Math.Sqrt(3), shared.Uncertainty, 1e-9);
    }

    [Fact]
    public void A_shared_offset_that_does_not_cancel_is_a_part_of_its_own()
    {
        // VT / (Pplat − (PEEPset + PEEPi)): one offset enters once from above and twice from below.
        var computed = Computation.Of(CatalogueData.Of("driving-pressure"), new Roots(
            [new Root(Kinds.Plateau, 25, "vent"), new Root(Kinds.PeepSet, 5, "vent"), new Root(Kinds.PeepIntrinsic, 5, "vent")]));
        var offset = Assert.Single(computed.Shares, share => share.Transducer == "vent");
        Assert.Equal(Math.Pow(2 / Math.Sqrt(3), 2) / Math.Pow(computed.Uncertainty, 2), offset.Fraction, 1e-6);
        Assert.Equal(1, computed.Shares.Sum(share => share.Fraction), 1e-12);
    }

    [Fact]
    public void A_compliance_from_a_small_pressure_difference_is_too_uncertain_to_publish()
    {
        var computed = Computation.Of(CatalogueData.Of("static-compliance"),
            new Roots([new Root(Kinds.TidalVolumeExpired, 400), new Root(Kinds.Plateau, 14), new Root(Kinds.PeepTotal, 9)]));
        Assert.Equal(Withheld.UncertaintyTooLarge, computed.Withheld);
    }

    private static Computation OnAir() => Of("aa-gradient", (Kinds.FiO2, 0.21, 0), (Kinds.BarometricPressure, 760, 2), (Kinds.WaterVapour, 47, 0),
        (Kinds.PaCO2, 40, 1), (Kinds.RespiratoryQuotient, 0.8, 0.0577), (Kinds.PaO2, 75, 3));

    private static Computation Of(string key, params (Kind Kind, double Value, double Standard)[] roots)
    {
        var computed = Computation.Of(CatalogueData.Of(key),
            new Roots(roots.Select(root => new Root(root.Kind, root.Value, Tolerance: Tolerance.Deviation(root.Standard, 0, "test")))));
        Assert.Null(computed.Withheld);
        return computed;
    }
}
