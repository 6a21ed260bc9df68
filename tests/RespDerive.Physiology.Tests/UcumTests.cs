using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// Conversions against figures typed here, not taken from the table: NIST SP 811 (2008), appendix B.8, for pressure, length, mass and temperature
/// (1 mm[Hg] = 133.3224 Pa, 1 cm[H2O] conventional = 98.0665 Pa); decimal prefixes and SI time for the rest. From memory.
/// For the diffusing capacity a mole of gas is 22.4 L, as in the lung function standards (factor 2.986).
/// UCUM rounds the millimetre of mercury to 133.322 Pa, hence the tolerance of 5 in a million.
/// </summary>
public sealed class UcumTests
{
    public static TheoryData<string, string, double> Factors => new()
    {
        { "kPa", "mm[Hg]", 7.500617 },
        { "Pa", "mm[Hg]", 0.007500617 },
        { "hPa", "cm[H2O]", 1.019716 },
        { "mbar", "cm[H2O]", 1.019716 },
        { "bar", "mm[Hg]", 750.0617 },
        { "mm[Hg]", "cm[H2O]", 1.359510 },
        { "cm[H2O]", "mm[Hg]", 0.7355592 },
        { "mm[H2O]", "mm[Hg]", 0.07355592 },
        { "L", "mL", 1000 },
        { "l", "mL", 1000 },
        { "dL", "mL", 100 },
        { "dl", "mL", 100 },
        { "cL", "mL", 10 },
        { "mL", "L", 0.001 },
        { "ml", "mL", 1 },
        { "cm3", "mL", 1 },
        { "L/min", "mL/min", 1000 },
        { "l/min", "L/min", 1 },
        { "mL/min", "L/min", 0.001 },
        { "ml/min", "L/min", 0.001 },
        { "L/s", "L/min", 60 },
        { "l/s", "L/min", 60 },
        { "mL/s", "L/min", 0.06 },
        { "ml/s", "L/min", 0.06 },
        { "/min", "/s", 1 / 60.0 },
        { "1/min", "/min", 1 },
        { "min-1", "/min", 1 },
        { "/s", "/min", 60 },
        { "Hz", "/min", 60 },
        { "1", "%", 100 },
        { "%", "1", 0.01 },
        { "s", "ms", 1000 },
        { "ms", "s", 0.001 },
        { "min", "s", 60 },
        { "h", "min", 60 },
        { "d", "h", 24 },
        { "a", "d", 365.25 },
        { "cm", "[in_i]", 0.3937008 },
        { "m", "cm", 100 },
        { "mm", "cm", 0.1 },
        { "km", "m", 1000 },
        { "[in_i]", "cm", 2.54 },
        { "[ft_i]", "m", 0.3048 },
        { "kg", "g", 1000 },
        { "g", "kg", 0.001 },
        { "[lb_av]", "kg", 0.4535924 },
        { "L/kPa", "mL/cm[H2O]", 98.0665 },
        { "mL/kPa", "mL/cm[H2O]", 0.0980665 },
        { "mL/cm[H2O]", "mL/mbar", 1.019716 },
        { "L/cm[H2O]", "mL/cm[H2O]", 1000 },
        { "mL/mbar", "mL/cm[H2O]", 0.980665 },
        { "mL/hPa", "mL/cm[H2O]", 0.980665 },
        { "kPa/L", "cm[H2O]/L", 10.19716 },
        { "cm[H2O]/L", "kPa/L", 0.0980665 },
        { "cm[H2O]/mL", "cm[H2O]/L", 1000 },
        { "mbar/L", "cm[H2O]/L", 1.019716 },
        { "kPa.s/L", "cm[H2O].s/L", 10.19716 },
        { "cm[H2O].s/L", "mbar.s/L", 0.980665 },
        { "cm[H2O]/L/s", "cm[H2O].s/L", 1 },
        { "mbar.s/L", "cm[H2O].s/L", 1.019716 },
        { "mL/kg", "L/kg", 0.001 },
        { "L/kg", "mL/kg", 1000 },
        { "mm[Hg]/cm[H2O]", "kPa/cm[H2O]", 0.1333224 },
        { "kPa/cm[H2O]", "mm[Hg]/cm[H2O]", 7.500617 },
        { "[pH]", "[pH]", 1 },
        { "g/dL", "g/L", 10 },
        { "g/L", "g/dL", 0.1 },
        { "mg/mL", "g/dL", 0.1 },
        { "mol/L", "mmol/L", 1000 },
        { "mmol/L", "umol/L", 1000 },
        { "umol/L", "mmol/L", 0.001 },
        { "mL/dL", "mL/L", 10 },
        { "mL/L", "mL/dL", 0.1 },
        { "mL/g", "mL/g", 1 },
        { "mL/dL/mm[Hg]", "mL/dL/kPa", 7.500617 },
        { "mL/L/mm[Hg]", "mL/dL/mm[Hg]", 0.1 },
        { "mL/dL/kPa", "mL/dL/mm[Hg]", 0.1333224 },
        { "mL/L/kPa", "mL/dL/mm[Hg]", 0.01333224 },
        { "mL/kPa/kg", "mL/cm[H2O]/kg", 0.0980665 },
        { "mL/cm[H2O]/kg", "mL/kPa/kg", 10.19716 },
        { "mL/mbar/kg", "mL/cm[H2O]/kg", 0.980665 },
        { "/min/L", "/min/mL", 0.001 },
        { "/(min.L)", "/min/L", 1 },
        { "/min/mL", "/min/L", 1000 },
        { "J", "L.cm[H2O]", 10.19716 },
        { "mJ", "J", 0.001 },
        { "L.cm[H2O]", "J", 0.0980665 },
        { "J/min", "W", 1 / 60.0 },
        { "W", "J/min", 60 },
        { "mW", "J/min", 0.06 },
        { "J/(L.cm[H2O])", "J/(L.cm[H2O])", 1 },
        { "mL/min/mm[Hg]", "mL/min/kPa", 7.500617 },
        { "mL/min/kPa", "mL/min/mm[Hg]", 0.1333224 },
        { "mmol/min/kPa", "mL/min/mm[Hg]", 2.986422 },
        { "mmol/(min.kPa)", "mL/min/mm[Hg]", 2.986422 },
        { "mL/min/mm[Hg]/L", "mL/min/kPa/L", 7.500617 },
        { "mL/min/kPa/L", "mL/min/mm[Hg]/L", 0.1333224 },
        { "mmol/min/kPa/L", "mL/min/mm[Hg]/L", 2.986422 },
        { "mmol/(min.kPa.L)", "mL/min/mm[Hg]/L", 2.986422 },
        { "min.mm[Hg]", "min.kPa", 0.1333224 },
        { "min.kPa", "min.mm[Hg]", 7.500617 },
        { "min.mm[Hg]/mL", "min.kPa/mL", 0.1333224 },
        { "min.kPa/mL", "min.mm[Hg]/mL", 7.500617 },
        { "mm[Hg].L/mL", "kPa.L/mL", 0.1333224 },
        { "kPa.L/mL", "mm[Hg].L/mL", 7.500617 },
        { "mmol/L", "mol/L", 0.001 },
        { "meq/L", "mmol/L", 1 },
        { "mmol/L/mm[Hg]", "mmol/L/kPa", 7.500617 },
        { "mmol/L/kPa", "mmol/L/mm[Hg]", 0.1333224 },
    };

    [Theory]
    [MemberData(nameof(Factors))]
    public void A_unit_converts_by_the_published_factor(string from, string to, double factor)
    {
        Assert.True(Ucum.TryConvert(1, from, to, out var converted));
        Assert.Equal(factor, (double)converted, 5e-6 * factor);
    }

    [Fact]
    public void Every_unit_of_every_kind_is_checked_above()
    {
        var accepted = Kinds.All.Concat(Catalogue.Shipped.All.Select(definition => definition.Result)).Where(kind => kind.Unit is not null).SelectMany(kind => Ucum.Alike(kind.Unit!)).Distinct()
            .Except(Ucum.Alike("Cel")); // temperatures have an offset, below
        var listed = Factors.Select(row => row.Data.Item1).ToHashSet();
        Assert.All(accepted, unit => Assert.Contains(unit, listed));
    }

    [Theory]
    [InlineData(98.6, "[degF]", "Cel", 37)]
    [InlineData(32, "[degF]", "K", 273.15)]
    [InlineData(-40, "Cel", "[degF]", -40)]
    public void Temperatures_convert_with_their_offset(double value, string from, string to, double expected)
    {
        Assert.True(Ucum.TryConvert((decimal)value, from, to, out var converted));
        Assert.Equal(expected, (double)converted, 1e-9);
    }

    [Theory]
    [InlineData("mmHg", "mm[Hg]")]
    [InlineData("", "mm[Hg]")]
    [InlineData("MM[HG]", "mm[Hg]")]
    [InlineData("mL", "mm[Hg]")]
    [InlineData("%", "mm[Hg]")]
    public void A_unit_outside_the_table_or_of_another_dimension_is_refused(string from, string to) => Assert.False(Ucum.TryConvert(1, from, to, out _));

    [Theory]
    [InlineData("{breaths}/min", "/min")]
    [InlineData("%{vol}", "1")]
    [InlineData("{ratio}", "1")]
    public void Annotations_carry_no_meaning(string from, string to) => Assert.True(Ucum.TryConvert(1, from, to, out _));

    [Fact]
    public void A_number_too_large_for_the_target_is_refused_not_wrapped() => Assert.False(Ucum.TryConvert(decimal.MaxValue, "kPa", "Pa", out _));
}
