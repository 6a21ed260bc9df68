using RespDerive.Physiology.Definitions;
using RespDerive.Physiology.Inputs;
using RespDerive.Physiology.Units;

namespace RespDerive.Physiology.Tests;

/// <summary>Helper formulas against published tables.</summary>
public sealed class PhysicalTableTests
{
    /// <summary>Standard atmosphere (ISO 2533:1975, US Standard Atmosphere 1976): heights of cities and passes, and 22 632.1 Pa at 11 km.</summary>
    [Theory]
    [InlineData(0, 760.0)]
    [InlineData(500, 716.0)]
    [InlineData(1000, 674.1)]
    [InlineData(1500, 634.2)]
    [InlineData(1609, 625.8)]
    [InlineData(2000, 596.3)]
    [InlineData(2240, 578.7)]
    [InlineData(2500, 560.2)]
    [InlineData(2640, 550.4)]
    [InlineData(3000, 525.9)]
    [InlineData(3640, 484.4)]
    [InlineData(4000, 462.3)]
    [InlineData(5000, 405.2)]
    [InlineData(8848, 235.8)]
    [InlineData(11000, 169.75)]
    public void The_standard_atmosphere_follows_its_table(double metres, double mmHg) => Assert.Equal(mmHg, StandardAtmosphere.PressureMmHg(metres), 0.08);

    /// <summary>West 1996 (coefficients seen in public code): the equation's own values, and the 253 mm[Hg] measured on the summit of Everest in 1981.</summary>
    [Theory]
    [InlineData(0, 759.5, 0.06)]
    [InlineData(1000, 678.6, 0.06)]
    [InlineData(2240, 587.6, 0.06)]
    [InlineData(3640, 496.8, 0.06)]
    [InlineData(5000, 419.7, 0.06)]
    [InlineData(8848, 253, 1)]
    public void The_mountain_atmosphere_follows_its_table(double metres, double mmHg, double within) => Assert.Equal(mmHg, WestAtmosphere.PressureMmHg(metres), within);

    [Fact]
    public void On_mountains_the_standard_atmosphere_reads_low() =>
        Assert.All(Enumerable.Range(5, 84).Select(h => h * 100.0), metres => Assert.True(WestAtmosphere.PressureMmHg(metres) > StandardAtmosphere.PressureMmHg(metres)));

    /// <summary>Vapour pressure of water, Lide (ed.), CRC Handbook of Chemistry and Physics, as reprinted in a public encyclopaedia; at 34 °C and from 36 to 41 °C IAPWS.</summary>
    [Theory]
    [InlineData(0, 4.585)]
    [InlineData(10, 9.2115)]
    [InlineData(20, 17.5424)]
    [InlineData(25, 23.7695)]
    [InlineData(30, 31.8439)]
    [InlineData(34, 39.95)]
    [InlineData(35, 42.2037)]
    [InlineData(36, 44.61)]
    [InlineData(37, 47.12)]
    [InlineData(38, 49.75)]
    [InlineData(39, 52.51)]
    [InlineData(40, 55.3651)]
    [InlineData(41, 58.42)]
    public void Water_vapour_follows_its_table(double celsius, double mmHg) => Assert.Equal(mmHg, WaterVapour.PressureMmHg(celsius), 0.08);

    [Fact]
    public void Water_vapour_at_37_degrees_is_the_47_of_the_trade() =>
        Assert.Equal(Kinds.WaterVapour.Assumed!.Value, WaterVapour.PressureMmHg(37), 0.2);

    /// <summary>Spirometry tables give 0.826 for 37 °C and 760 mm[Hg]; 273.15/310.15 · 713/760 on paper.</summary>
    [Fact]
    public void Saturated_gas_at_37_degrees_shrinks_to_its_published_dry_volume() => Assert.Equal(0.826238, GasVolumes.BtpsToStpd(760, 47, 37), 1e-6);

    [Fact]
    public void Dry_gas_at_standard_conditions_does_not_change() => Assert.Equal(1, GasVolumes.BtpsToStpd(760, 0, 0), 1e-12);

    /// <summary>The factor of the alveolar ventilation equation is 760·310.15/273.15/1000: what is left of the conversion when the vapour cancels.</summary>
    [Fact]
    public void The_carbon_dioxide_factor_is_the_volume_conversion_times_the_dry_pressure() =>
        Assert.Equal(Kinds.CO2Conversion.Assumed!.Value, (760 - 47) / GasVolumes.BtpsToStpd(760, 47, 37) / 1000, 1e-4);

    /// <summary>NIST SP 811: 1 kPa = 7.50062 mm[Hg]; UCUM rounds the millimetre of mercury to 133.322 Pa, 3 parts in a million apart.</summary>
    [Theory]
    [InlineData(1, "kPa", "mm[Hg]", 7.50062, 2e-5)]
    [InlineData(1, "mm[Hg]", "cm[H2O]", 1.35951, 1e-5)]
    [InlineData(101.325, "kPa", "mm[Hg]", 760, 0.003)]
    public void Pressures_convert_by_the_published_factors(double value, string from, string to, double expected, double within)
    {
        Assert.True(Ucum.TryConvert((decimal)value, from, to, out var converted));
        Assert.Equal(expected, (double)converted, within);
    }

    /// <summary>CLSI C46 corrects oxygen with a polynomial of the tension (from memory); Severinghaus's exponential is an independent fit to the same blood.</summary>
    [Fact]
    public void Both_published_temperature_corrections_of_oxygen_agree_within_a_tenth_of_a_percent()
    {
        for (var tension = 10; tension <= 500; tension += 5)
        {
            for (var celsius = 25.0; celsius <= 42; celsius += 0.5)
            {
                var power = Math.Pow(tension, 3.88);
                var clsi = tension * Math.Pow(10, ((5.49e-11 * power) + 0.071) / ((9.72e-9 * power) + 2.30) * (celsius - 37));
                Assert.Equal(1, Po2TemperatureCorrected.Of(tension, celsius) / clsi, 0.0011);
            }
        }
    }
}
