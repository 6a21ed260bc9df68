using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Timeline.Tests.Ward;

namespace RespDerive.Timeline.Tests;

/// <summary>Which definitions run, and what a record makes of bands and of values with constants of their own.</summary>
public sealed class RunningTests
{
    private static readonly Reading[] Breath =
    [
        Read("gas", Kinds.PaO2, 75, 60), Read("fio2", Kinds.FiO2Set, 0.5, 5), Read("peep", Kinds.PeepSet, 8, 5),
    ];

    private static Policy Naming(params string[] keys) => SeaLevel with { Definitions = keys };

    [Fact]
    public void Without_a_list_of_the_site_what_is_on_by_default_runs() => Assert.All(Catalogue.Shipped.All, definition =>
    {
        Assert.Equal(definition.OnByDefault && !definition.ByHandOnly, SeaLevel.Runs(definition));
        Assert.Equal(!definition.ByHandOnly, Naming(definition.Key).Runs(definition));
        Assert.False(Naming().Runs(definition));
    });

    [Fact]
    public void A_band_runs_only_where_the_site_names_it()
    {
        Assert.Empty(Evaluate("ards-oxygenation-band", Breath));
        Assert.Single(Evaluate("ards-oxygenation-band", null, Naming("ards-oxygenation-band"), Breath));
    }

    /// <summary>Berlin definition, JAMA 2012;307:2526, table 3: a P/F ratio of 150 is moderate.</summary>
    [Fact]
    public void A_band_is_a_code_without_number_unit_or_uncertainty()
    {
        var outcome = Assert.Single(Evaluate("ards-oxygenation-band", null, Naming("ards-oxygenation-band"), Breath));
        Assert.Equal((null, "moderate", "berlin-2012"), (outcome.Withheld, outcome.Code, outcome.Variant));
        Assert.Equal((null, null, null, null), (outcome.Value, outcome.Published, outcome.Unit, outcome.Uncertainty));
        Assert.Equal(150, Assert.Single(outcome.Intermediates, step => step.Definition == "pf-ratio").Value);
    }

    [Fact]
    public void Another_band_is_another_result()
    {
        var policy = Naming("ards-oxygenation-band");
        var outcome = Assert.Single(Evaluate("ards-oxygenation-band", null, policy, Breath));
        Assert.True(OutcomeComparison.Same(outcome, Assert.Single(Evaluate("ards-oxygenation-band", null, policy, Breath))));
        Assert.False(OutcomeComparison.Same(outcome, outcome with { Code = "mild" }));
    }

    [Fact]
    public void A_band_without_pressure_says_that_it_is_not_corrected_for_altitude()
    {
        var outcome = Assert.Single(Evaluate("ards-oxygenation-band", null, new Policy { Definitions = ["ards-oxygenation-band"] }, Breath));
        Assert.Equal("moderate", outcome.Code);
        Assert.Contains(Flags.AltitudeUnknown, outcome.Flags);
    }

    [Fact]
    public void Oxygen_content_rests_on_one_sample_and_names_the_constants_it_took()
    {
        var outcome = Assert.Single(Evaluate("oxygen-content", null, Naming("oxygen-content"),
            Read("gas", Kinds.PaO2, 90, 60), Read("sat", Kinds.SaO2, 97, 60), Read("hb", Kinds.Hemoglobin, 10, 60)));
        Assert.Null(outcome.Withheld);
        Assert.Contains(Flags.DyshemoglobinUnknown, outcome.Flags);
        Assert.Contains(outcome.Inputs, input => input is { Kind: "hemoglobin", Assumed: false });
        Assert.Contains(outcome.Inputs, input => input.Kind == Kinds.Huefner.Key && input.Assumed && input.Value == Kinds.Huefner.Assumed);
    }

    [Fact]
    public void Bicarbonate_is_of_the_sample_and_names_its_set_of_constants()
    {
        var outcome = Assert.Single(Evaluate("bicarbonate", null, Naming("bicarbonate"), Read("ph", Kinds.PhArterial, 7.4, 60), Read("co2", Kinds.PaCO2, 40, 60)));
        Assert.Equal(24.2m, outcome.Published);
        Assert.Contains(outcome.Inputs, input => input is { Kind: "carbonic-acid-pk", Assumed: true, Value: 6.105 });
    }

    [Theory]
    [InlineData("high-flow oxygen", null)]
    [InlineData("invasive ventilation", Withheld.NotOnHighFlow)]
    [InlineData(null, Withheld.NotOnHighFlow)]
    public void The_rox_index_from_a_record_needs_proof_of_high_flow(string? support, string? withheld)
    {
        Reading[] readings = [Read("sat", Kinds.SpO2, 96, 60), Read("fio2", Kinds.FiO2Set, 0.48, 5), Read("rr", Kinds.RespiratoryRate, 20, 60)];
        var outcomes = Evaluate("rox-index", null, Naming("rox-index"), [.. readings, .. support is null ? (Reading[])[] : [Read("support", Kinds.Support, Kinds.Support.Codes.ToList().IndexOf(support), 5)]]);
        Assert.All(outcomes, outcome => Assert.Equal(withheld, outcome.Withheld));
        Assert.Equal(withheld is null ? [10m] : [], outcomes.Where(outcome => outcome.Withheld is null).Select(outcome => outcome.Published!.Value));
    }
}
