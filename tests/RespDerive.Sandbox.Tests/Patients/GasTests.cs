using RespDerive.Sandbox.Patients.Gas;

namespace RespDerive.Sandbox.Tests.Patients;

public sealed class GasTests
{
    private static readonly Circulation s_body = new(200, 0.8, 5, 14, 24, 0, 0.3, 1.5);

    // Severinghaus 1979, J Appl Physiol 46:599-602, Table 1 (PO2 mm[Hg], % saturation at pH 7.40, 37 °C).
    // The abstract states a greatest difference of 0.55 % S for equation 1.
    [Theory]
    [InlineData(10, 9.58)]
    [InlineData(20, 32.12)]
    [InlineData(26, 48.27)]
    [InlineData(30, 57.54)]
    [InlineData(40, 74.69)]
    [InlineData(50, 85.08)]
    [InlineData(60, 90.85)]
    [InlineData(70, 94.06)]
    [InlineData(80, 95.84)]
    [InlineData(90, 96.88)]
    [InlineData(100, 97.49)]
    [InlineData(150, 98.77)]
    [InlineData(300, 99.53)]
    [InlineData(500, 99.72)]
    public void Dissociation_curve_matches_the_published_table(double po2, double percent) =>
        Assert.Equal(percent, 100 * Dissociation.Saturation(po2), 0.55);

    // Bohr effect: P50 rises when pH falls, about −0.48 in log10 P per pH unit (textbook value, from memory).
    [Fact]
    public void Acid_blood_holds_less_oxygen()
    {
        var shifted = 26.86 * Math.Pow(10, 0.48 * 0.2);
        Assert.Equal(0.5, Dissociation.Saturation(shifted, 7.20), 0.02);
    }

    // Alveolar gas equation on pure oxygen: PB − 47 − PaCO2, since R drops out (Fenn, Rahn and Otis 1946).
    [Fact]
    public void On_pure_oxygen_the_quotient_drops_out()
    {
        Assert.Equal(673, GasExchange.Alveolar(1, 40, 0.8), 9);
        Assert.Equal(673, GasExchange.Alveolar(1, 40, 1.0), 9);
    }

    // On air at sea level about 100 mm[Hg] (West, Respiratory Physiology, chapter on ventilation; locator from memory).
    [Fact]
    public void On_air_it_is_about_one_hundred() => Assert.Equal(101, GasExchange.Alveolar(0.2093, 40, 0.8), 1.0);

    // PaCO2 = 0.863·V̇CO2/V̇A: 200 mL/min and 4.315 L/min give 40 (the constant is 760·310.15/273.15/1000).
    [Fact]
    public void Carbon_dioxide_follows_alveolar_ventilation() =>
        Assert.Equal(40, GasExchange.SteadyPaCO2(s_body, 4.315 / 0.7), 0.01);

    [Fact]
    public void Without_shunt_arterial_equals_alveolar_and_shunt_lowers_it()
    {
        var healthy = new GasExchange();
        healthy.Step(s_body, 0.21, 6.16);
        Assert.Equal(healthy.AlveolarPO2, healthy.PaO2, 6);
        Assert.Equal(7.40, healthy.Ph, 0.02);
        var shunting = new GasExchange();
        shunting.Step(s_body with { Shunt = 0.3 }, 1, 6.16);
        // Shunt equation on pure oxygen: (Cc' − Ca)/(Cc' − Cv) gives the shunt back.
        double Content(double po2, double ph) => Dissociation.Content(po2, ph, 14);
        var capillary = Content(shunting.AlveolarPO2, shunting.Ph);
        var arterial = Content(shunting.PaO2, shunting.Ph);
        var venous = Content(shunting.MixedVenousPO2, shunting.Ph - 0.03);
        Assert.Equal(0.3, (capillary - arterial) / (capillary - venous), 6);
        Assert.Equal(5, arterial - venous, 6);
    }

    // A step of FiO2 is 63.2 % done after the wash-in time, and CO2 is slower than oxygen.
    [Fact]
    public void Gases_follow_changes_with_their_own_delay()
    {
        var gas = new GasExchange();
        var body = s_body with { WashIn = 2 };
        gas.Step(body, 0.4, 6.16);
        var before = gas.AlveolarPO2;
        gas.Step(body, 0.8, 6.16);
        gas.Step(body, 0.8, 6.16);
        var after = GasExchange.Alveolar(0.8, 40, 0.8);
        Assert.Equal(0.632, (gas.AlveolarPO2 - before) / (after - before), 0.01);
    }
}
