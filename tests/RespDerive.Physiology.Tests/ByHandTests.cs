using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Tests;

public sealed class ByHandTests
{
    [Theory]
    [InlineData("Pa02", "PaO2")]
    [InlineData("pao2x", "pao2")]
    [InlineData("PAo2", "PAO2")]
    [InlineData("plateau-presure", "plateau-pressure")]
    public void An_unknown_name_is_an_error_that_lists_near_names(string name, string near) =>
        Assert.Contains(near, Refused("pf-ratio", (name, 90, "mm[Hg]"), ("FiO2", 0.4, "1")), StringComparison.Ordinal);

    [Fact]
    public void Names_are_case_sensitive_and_alveolar_is_not_arterial()
    {
        var computed = Compute("pf-ratio", ("PAO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"));
        Assert.Equal(Withheld.InputMissing, computed.Computation.Withheld);
        Assert.Equal(["PAO2"], computed.Unused);
    }

    [Fact]
    public void A_known_name_without_a_part_in_the_value_is_listed_as_unused()
    {
        var computed = Compute("elastance-respiratory-system", ("Pplat", 30, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("VT", 0.4, "L"), ("Pes_ei", 18, "cm[H2O]"), ("PaO2", 5000, "mm[Hg]"));
        Assert.Equal(50, computed.Computation.Value, 1e-9);
        Assert.Equal(["Pes_ei", "PaO2"], computed.Unused);
    }

    [Fact]
    public void A_lesser_input_of_the_same_slot_is_unused()
    {
        var computed = Compute("driving-pressure", ("Pplat", 26, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"), ("PEEPset", 5, "cm[H2O]"));
        Assert.Equal(14, computed.Computation.Value, 1e-9);
        Assert.Equal(["PEEPset"], computed.Unused);
        Assert.DoesNotContain(Flags.PeepNotTotal, computed.Computation.Flags);
    }

    [Fact]
    public void A_peak_pressure_without_a_plateau_serves_a_gate() =>
        Assert.Empty(Compute("static-compliance", ("VT", 420, "mL"), ("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")).Unused);

    [Fact]
    public void An_intermediate_value_is_given_or_computed_but_not_both()
    {
        Assert.Contains("PAO2", Refused("aa-gradient", ("PAO2", 100, "mm[Hg]"), ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]")), StringComparison.Ordinal);
        Assert.Contains("PBW", Refused("tidal-volume-per-pbw", ("VT", 438, "mL"), ("PBW", 73, "kg"), ("sex", "male"), ("height", 178, "cm")), StringComparison.Ordinal);
        Assert.Contains("Cstat", Refused("driving-pressure", ("VT", 420, "mL"), ("Cstat", 30, "mL/cm[H2O]"), ("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")), StringComparison.Ordinal);
        Assert.Contains("VE", Refused("ventilatory-ratio", ("VE", 7, "L/min"), ("VT", 500, "mL"), ("RR", 14, "/min"), ("PaCO2", 40, "mm[Hg]"), ("PBW", 70, "kg")), StringComparison.Ordinal);
    }

    [Fact]
    public void The_same_kind_twice_is_an_error() =>
        Assert.Contains("twice", Refused("pf-ratio", ("PaO2", 90, "mm[Hg]"), ("pao2", 80, "mm[Hg]"), ("FiO2", 0.4, "1")), StringComparison.Ordinal);

    [Theory]
    [InlineData("PaO2", "kg")]
    [InlineData("PaO2", "mmHg")]
    public void A_wrong_unit_is_an_error_that_lists_the_accepted_ones(string name, string unit) =>
        Assert.Contains("kPa", Refused("pf-ratio", (name, 90, unit), ("FiO2", 0.4, "1")), StringComparison.Ordinal);

    [Fact]
    public void A_word_in_place_of_a_number_is_an_error() => Refused("pf-ratio", ("PaO2", "high"), ("FiO2", 0.4, "1"));

    [Fact]
    public void A_word_outside_the_list_of_codes_is_an_error() =>
        Assert.Contains("female", Refused("predicted-body-weight", ("sex", "F"), ("height", 170, "cm")), StringComparison.Ordinal);

    [Fact]
    public void A_value_out_of_range_is_withheld_by_its_own_code() =>
        Assert.Equal(Withheld.Fio2UnitImplausible, Compute("pf-ratio", ("PaO2", 90, "mm[Hg]"), ("FiO2", 40, "1")).Computation.Withheld);

    [Fact]
    public void Missing_stands_for_an_absent_input() =>
        Assert.Equal(Withheld.InputMissing, Compute("pf-ratio", ("PaO2", 90, "mm[Hg]"), ("FiO2", "missing")).Computation.Withheld);

    [Fact]
    public void Assumed_constants_are_named_as_such()
    {
        var computed = Compute("alveolar-po2", ("FiO2", 0.21, "1"), ("PB", 760, "mm[Hg]"), ("PaCO2", 40, "mm[Hg]"));
        Assert.Equal([Kinds.WaterVapour, Kinds.RespiratoryQuotient], computed.Inputs.Where(input => input.Assumed).Select(input => input.Kind));
        Assert.Equal([47, 0.8], computed.Inputs.Where(input => input.Assumed).Select(input => input.Value));
    }

    [Fact]
    public void A_given_alveolar_tension_needs_no_assumption() =>
        Assert.DoesNotContain(Compute("aa-gradient", ("PAO2", 100, "mm[Hg]"), ("PaO2", 90, "mm[Hg]")).Inputs, input => input.Assumed);

    [Theory]
    [InlineData("minute-ventilation", "RR", "respiratory-rate-total")]
    [InlineData("minute-ventilation", "VT", "tidal-volume-expired")]
    [InlineData("ventilatory-ratio", "VE", "minute-volume-expired")]
    [InlineData("static-compliance", "PEEP", "peep")]
    [InlineData("alveolar-po2", "R", "respiratory-quotient")]
    [InlineData("pf-ratio", "flow", "inspiratory-flow-set")]
    public void A_symbol_means_the_kind_the_definition_uses(string definition, string symbol, string key) =>
        Assert.Equal(key, new Vocabulary(CatalogueData.Of(definition), Catalogue.Shipped).Find(symbol).Key);

    [Fact]
    public void An_impossible_intermediate_value_withholds_the_result()
    {
        // 0.21·(300 − 47) − 42·(0.21 + 0.79/0.8) is 2.8 mm[Hg]: no alveolar tension, though the difference of −7 would pass.
        var computed = Compute("aa-gradient", ("FiO2", 0.21, "1"), ("PB", 300, "mm[Hg]"), ("PaCO2", 42, "mm[Hg]"), ("PaO2", 10, "mm[Hg]"));
        Assert.Equal(Withheld.Impossible, computed.Computation.Withheld);
    }

    private static ByHand Compute(string key, params Given[] given) => ByHand.Compute(CatalogueData.Of(key), given);

    private static string Refused(string key, params Given[] given) =>
        Assert.Throws<UnusableRequestException>(() => Compute(key, given)).Message;
}
