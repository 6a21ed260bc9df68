namespace RespDerive.Physiology.Tests;

/// <summary>Where flags begin and gates end.</summary>
public sealed class FlagTests
{
    [Theory]
    [InlineData(97, false)]
    [InlineData(97.1, true)]
    public void A_saturation_above_97_percent_is_flagged_not_withheld(double spo2, bool flagged) =>
        Assert.Equal(flagged, Flagged("sf-ratio", Flags.Spo2Above97, ("SpO2", spo2, "%"), ("FiO2", 0.3, "1")));

    [Theory]
    [InlineData(9.9, Withheld.NotEquilibrated, false)]
    [InlineData(10, null, true)]
    [InlineData(19.9, null, true)]
    [InlineData(20, null, false)]
    public void A_fraction_changed_before_the_draw_withholds_then_flags_then_passes(double minutes, string? withheld, bool flagged)
    {
        var computed = Of("pf-ratio", ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("FiO2_changed_before_draw", minutes, "min"));
        Assert.Equal(withheld, computed.Withheld);
        Assert.Equal(flagged, computed.Flags.Contains(Flags.Settling));
    }

    [Theory]
    [InlineData("PEEP_lowered_before_draw", 14, true)]
    [InlineData("PEEP_lowered_before_draw", 15, false)]
    [InlineData("PEEP_raised_before_draw", 59, true)]
    [InlineData("PEEP_raised_before_draw", 60, false)]
    public void A_pressure_change_before_the_draw_is_flagged_as_settling(string name, double minutes, bool flagged) =>
        Assert.Equal(flagged, Flagged("oxygenation-index", Flags.Settling, ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("Pmean", 15, "cm[H2O]"), (name, minutes, "min")));

    [Theory]
    [InlineData(24, true)]
    [InlineData(23, false)]
    public void A_peak_below_the_plateau_flags_dynamic_compliance(double plateau, bool flagged) =>
        Assert.Equal(flagged, Flagged("dynamic-compliance", Flags.PeakBelowPlateau, ("VT", 420, "mL"), ("Ppeak", 23.5, "cm[H2O]"), ("PEEPtot", 8, "cm[H2O]"), ("Pplat", plateau, "cm[H2O]")));

    [Theory]
    [InlineData("PEEPtot", false)]
    [InlineData("PEEP", true)]
    [InlineData("PEEPset", true)]
    public void A_pressure_that_may_not_be_total_is_flagged_and_named_as_a_variant(string name, bool flagged)
    {
        var computed = Of("elastance", ("VT", 420, "mL"), ("Pplat", 24, "cm[H2O]"), (name, 10, "cm[H2O]"));
        Assert.Equal(flagged, computed.Flags.Contains(Flags.PeepNotTotal));
        Assert.Equal(flagged ? "peep-not-total" : null, computed.Variant);
    }

    [Theory]
    [InlineData("static-compliance")]
    [InlineData("dynamic-compliance")]
    [InlineData("driving-pressure")]
    [InlineData("elastance")]
    public void Mechanics_without_evidence_of_passivity_are_flagged(string key)
    {
        Given[] readings = [("VT", 420, "mL"), ("Pplat", 24, "cm[H2O]"), ("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")];
        Assert.True(Flagged(key, Flags.PassivityUnconfirmed, readings));
        Assert.False(Flagged(key, Flags.PassivityUnconfirmed, [.. readings, ("patient_effort", "false")]));
    }

    [Fact]
    public void A_predicted_weight_without_an_age_is_flagged_wherever_it_is_used()
    {
        Given[] body = [("sex", "female"), ("height", 165, "cm")];
        Assert.True(Flagged("predicted-body-weight", Flags.AgeUnconfirmed, body));
        Assert.False(Flagged("predicted-body-weight", Flags.AgeUnconfirmed, [.. body, ("age", 18, "a")]));
        Assert.True(Flagged("tidal-volume-per-pbw", Flags.AgeUnconfirmed, [("VT", 400, "mL"), .. body]));
        Assert.False(Flagged("tidal-volume-per-pbw", Flags.AgeUnconfirmed, ("VT", 400, "mL"), ("PBW", 57, "kg")));
    }

    [Theory]
    [InlineData(210, false)]
    [InlineData(450, true)]
    public void A_value_outside_the_usual_range_is_published_with_a_flag(double pao2, bool flagged) =>
        Assert.Equal(flagged, Flagged("pf-ratio", Flags.OutsideUsual, ("PaO2", pao2, "mm[Hg]"), ("FiO2", 0.8, "1")));

    [Fact]
    public void The_first_reason_in_the_order_of_precedence_is_the_one_given()
    {
        // Venous sample, FiO2 changed 4 min before, extracorporeal support: not-arterial comes first.
        var computed = Of("pf-ratio", ("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("sample", "venous"), ("FiO2_changed_before_draw", 4, "min"), ("ecls", "true"));
        Assert.Equal(Withheld.NotArterial, computed.Withheld);
    }

    [Fact]
    public void A_value_out_of_range_neither_trips_a_gate_nor_keeps_one_silent()
    {
        // The fraction is nonsense, yet the sample is venous: the sample comes first.
        Assert.Equal(Withheld.NotArterial, Of("pf-ratio", ("PaO2", 42, "mm[Hg]"), ("FiO2", 40, "1"), ("sample", "venous")).Withheld);

        // Taken at its word, an age of −3 would be that of a child.
        Assert.Equal(Withheld.InputInvalid, Of("predicted-body-weight", ("sex", "male"), ("height", 170, "cm"), ("age", -3, "a")).Withheld);
        Assert.Equal(Withheld.HeightOutOfRange, Of("predicted-body-weight", ("sex", "male"), ("height", 110, "cm")).Withheld);
    }

    private static bool Flagged(string key, string flag, params Given[] given)
    {
        var computed = Of(key, given);
        Assert.Null(computed.Withheld);
        return computed.Flags.Contains(flag);
    }

    private static Computation Of(string key, params Given[] given) => ByHand.Compute(CatalogueData.Of(key), given).Computation;
}
