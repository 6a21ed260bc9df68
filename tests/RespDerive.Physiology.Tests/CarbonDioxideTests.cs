using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

/// <summary>Choices, borders and uncertainty of the values of carbon dioxide, acid and base, and diffusion.</summary>
public sealed class CarbonDioxideTests
{
    private static readonly Given[] Acidosis = [("pH", 7.2, "[pH]"), ("PCO2", 60, "mm[Hg]")];

    /// <summary>Numbers of the three published forms at pH 7.20 and 60 mm[Hg] (8 kPa), worked on paper from the printed constants.</summary>
    [Theory]
    [InlineData("clsi", -5.698, "Hb", 12, "g/dL", null)]
    [InlineData("lang-zander", -6.009, "Hb", 12, "g/dL", 95.0)]
    [InlineData("siggaard-andersen", -5.178, "ctHb", 7.45, "mmol/L", null)]
    public void The_base_excess_takes_the_form_its_inputs_ask_for_and_names_it(string variant, double expected, string name, double haemoglobin, string unit, double? saturation)
    {
        Given[] given = [.. Acidosis, (name, haemoglobin, unit), .. saturation is { } s ? new Given[] { ("SO2", s, "%") } : []];
        var computed = Of("base-excess-blood", given);
        Assert.Equal(variant, computed.Variant);
        Assert.Equal(expected, computed.Value, 0.01);
        Assert.Equal(computed.Value, Of($"base-excess-blood-{variant.Replace("lang-", "", StringComparison.Ordinal)}", given).Value);
    }

    [Fact]
    public void Constants_of_another_set_are_not_mixed_into_the_clsi_base_excess()
    {
        Given[] zander = [("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.1, "[pH]")];
        Assert.Null(Of("bicarbonate", [.. Acidosis, .. zander]).Withheld);
        Assert.Equal(Withheld.ConstantsMixed, Of("bicarbonate", [.. Acidosis, zander[1]]).Withheld);
        Assert.Equal(Withheld.ConstantsMixed, Of("base-excess-ecf", [.. Acidosis, .. zander]).Withheld);
    }

    [Theory]
    [InlineData("ph-temperature-corrected")]
    [InlineData("pco2-temperature-corrected")]
    [InlineData("po2-temperature-corrected")]
    public void A_gas_is_corrected_once_between_25_and_42_degrees_and_doubt_is_flagged(string key)
    {
        Given gas = key[..2] == "ph" ? ("pH", 7.3, "[pH]") : key[..2] == "pc" ? ("PaCO2", 40, "mm[Hg]") : ("PaO2", 80, "mm[Hg]");
        Assert.Equal(Withheld.TemperatureOutOfRange, Of(key, gas, ("temp", 24.9, "Cel")).Withheld);
        Assert.Equal(Withheld.TemperatureOutOfRange, Of(key, gas, ("temp", 42.1, "Cel")).Withheld);
        Assert.Equal(Withheld.AlreadyCorrected, Of(key, gas, ("temp", 33, "Cel"), ("corrected", "true")).Withheld);
        Assert.All([25.0, 42.0], celsius => Assert.Null(Of(key, gas, ("temp", celsius, "Cel")).Withheld));
        Assert.Contains(Flags.CorrectionUnstated, Of(key, gas, ("temp", 33, "Cel")).Flags);
        Assert.DoesNotContain(Flags.CorrectionUnstated, Of(key, gas, ("temp", 33, "Cel"), ("corrected", "false")).Flags);
    }

    [Fact]
    public void A_measured_mixed_expired_tension_goes_before_one_from_carbon_dioxide_production()
    {
        Given[] production = [("PaCO2", 50, "mm[Hg]"), ("VCO2", 220, "mL/min"), ("VE", 10, "L/min")];
        Assert.Equal("from-vco2", Of("dead-space-fraction-enghoff", production).Variant);
        var measured = Of("dead-space-fraction-enghoff", [.. production, ("PECO2", 25, "mm[Hg]")]);
        Assert.Null(measured.Variant);
        Assert.Equal(0.5, measured.Value, 1e-12);
    }

    /// <summary>Ann Intensive Care 2016, doi:10.1186/s13613-016-0118-8: root mean square error of predictive equations 15 % and more.</summary>
    [Fact]
    public void The_error_of_the_energy_equation_outweighs_that_of_height_and_weight()
    {
        var computed = Of("vco2-estimated", ("sex", "male"), ("weight", 70, "kg"), ("height", 175, "cm"), ("age", 60, "a"));
        Assert.InRange(computed.Uncertainty / computed.Value, 0.2, 0.22);
        Assert.True(computed.Shares.Single(share => share.Kind == Kinds.EnergyFactor).Fraction > 0.85);
    }

    [Theory]
    [InlineData("male", 40, 22.6118)]
    [InlineData("male", 14, 21.6235)]
    [InlineData("female", 40, 21.6235)]
    public void The_haemoglobin_adjustment_takes_a_boy_under_fifteen_as_a_woman(string sex, int age, double expected) =>
        Assert.Equal(expected, Of("dlco-hb-adjusted", ("DLCO", 18, "mL/min/mm[Hg]"), ("Hb", 90, "g/L"), ("sex", sex), ("age", age, "a")).Value, 1e-4);

    [Fact]
    public void A_haemoglobin_adjustment_without_an_age_is_flagged() =>
        Assert.Contains(Flags.AgeUnconfirmed, Of("dlco-hb-adjusted", ("DLCO", 18, "mL/min/mm[Hg]"), ("Hb", 9, "g/dL"), ("sex", "male")).Flags);

    /// <summary>ERS/ATS 2017: 1 mmol/min/kPa is about 3 (2.986) mL/min/mm[Hg].</summary>
    [Fact]
    public void A_diffusing_capacity_in_si_units_is_the_same_quantity() =>
        Assert.Equal(4, Of("kco", ("DLCO", 24 / 2.986412, "mmol/(min.kPa)"), ("VA", 6, "L")).Value, 1e-4);

    [Fact]
    public void A_capillary_volume_from_a_poor_split_is_too_uncertain_to_publish()
    {
        var computed = Computation.Of(CatalogueData.Of("capillary-volume"), new Roots(
            [new Root(Definitions.InverseThetaCo.Value, 1.3), new Root(Kinds.InverseThetaVc, 0.0173, Tolerance: Tolerance.Deviation(0, 0.31, "test"))]));
        Assert.Equal(Withheld.UncertaintyTooLarge, computed.Withheld);
    }

    [Fact]
    public void What_nothing_in_the_record_calls_for_is_by_hand_only()
    {
        var uncalled = Catalogue.Shipped.All.Where(definition => definition.Calling.Anchors.Count == 0).ToArray();
        Assert.NotEmpty(uncalled);
        Assert.All(uncalled, definition => Assert.True(definition.ByHandOnly, definition.Key));
    }

    [Fact]
    public void A_prediction_or_target_of_carbon_dioxide_is_by_hand_only() =>
        Assert.All(Catalogue.Shipped.All.Where(definition => definition.Key.Contains("-target-", StringComparison.Ordinal) || definition.Key == "paco2-predicted"),
            definition => Assert.True(definition.ByHandOnly, definition.Key));

    private static Computation Of(string key, params Given[] given) => ByHand.Compute(CatalogueData.Of(key), given).Computation;
}
