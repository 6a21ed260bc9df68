using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class ModeTests
{
    private static string Mode(string value) => Observation(Loinc("20124-4"), value);

    private static string Said(Timeline.Reading reading) => reading.Kind.Codes[(int)reading.Value];

    [Theory]
    [InlineData("Volume Control", "volume control")]
    [InlineData("VC-AC", "volume control")]
    [InlineData("Volume control (A/C)", "volume control")]
    [InlineData("pressure_control", "pressure control")]
    [InlineData("PC", "pressure control")]
    [InlineData("Pressure  support", "spontaneous")]
    [InlineData("CPAP", "spontaneous")]
    [InlineData("SIMV", "other")]
    [InlineData("Some mode of a maker", "unknown")]
    public void Words_of_the_trade_are_modes_and_all_others_unknown(string words, string mode)
    {
        var reading = One(Mode($"\"valueString\":\"{words}\""));

        Assert.Equal((Kinds.Mode, mode, words), (reading.Kind, Said(reading), reading.GivenUnit));
        Assert.Equal(mode, Said(One(Mode("\"valueCodeableConcept\":{\"text\":\"" + words + "\"}"))));
    }

    [Theory]
    [InlineData("475201", "volume control")]
    [InlineData("475147", "pressure control")]
    [InlineData("475161", "spontaneous")]
    public void Device_codes_are_modes(string code, string mode) =>
        Assert.Equal(mode, Said(One(Mode("\"valueCodeableConcept\":{\"coding\":[" + Coding(CodeSystems.Mdc, code) + "]}"))));

    [Fact]
    public void The_site_adds_modes_of_its_own()
    {
        var rows = SiteMaps.Values("key,system,code,value\nventilator-mode,,House Mode,pressure control\nventilator-mode,http://hospital.example/m,7,spontaneous\n");
        Assert.Empty(rows.Faults);
        var options = new ReadingOptions { Values = new CodedMap(rows.Rows) };

        Assert.Equal("pressure control", Said(Assert.Single(Read(options, Mode("\"valueString\":\"house-mode\"")).Readings)));
        Assert.Equal("spontaneous", Said(Assert.Single(Read(options, Mode("\"valueCodeableConcept\":{\"coding\":[" + Coding("http://hospital.example/m", "7") + "]}")).Readings)));
    }

    [Fact]
    public void A_number_is_no_mode_and_an_empty_one_is_absent()
    {
        Assert.Equal(Withheld.ValueNotExact, One(Mode(Quantity("3", "1"))).Refused);
        Assert.Equal(Withheld.ValueAbsent, One(Mode("\"valueCodeableConcept\":{}")).Refused);
    }

    [Fact]
    public void High_flow_is_a_support_the_site_maps()
    {
        var codes = new CodeMap([new("http://hospital.example/o", "O2DEV", "", "respiratory-support")]);

        var reading = Assert.Single(Read(new ReadingOptions(), codes, Observation(Coding("http://hospital.example/o", "O2DEV"), "\"valueString\":\"High-flow nasal cannula\"")).Readings);

        Assert.Equal("high-flow oxygen", Said(reading));
    }
}
