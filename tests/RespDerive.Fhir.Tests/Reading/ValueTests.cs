using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class ValueTests
{
    private static string Peep(string value) => Observation(Loinc("76248-4"), value);

    [Fact]
    public void A_kilopascal_gas_is_converted_and_the_sent_number_kept()
    {
        var reading = One(Observation(Loinc("2703-7"), Quantity("10.5", "kPa")));

        // 10.5 kPa / 0.133322 kPa per mm[Hg] (UCUM: m[Hg] = 133.322 kPa)
        Assert.Equal(78.757, reading.Value, 0.001);
        Assert.Equal((10.5m, "kPa"), (reading.Given, reading.GivenUnit));
    }

    [Fact]
    public void A_millibar_is_not_quite_a_centimetre_of_water() => Assert.Equal(10.197, One(Peep(Quantity("10", "mbar"))).Value, 0.001);

    [Fact]
    public void An_annotation_in_the_unit_says_nothing() =>
        Assert.Equal(18, One(Observation(Loinc("19840-8"), Quantity("18", "{Breaths}/min"))).Value);

    [Theory]
    [InlineData("mmHg", "2703-7", 80)]
    [InlineData("mm[Hg]", "2703-7", 80)]
    [InlineData("cmH2O", "76248-4", 8)]
    [InlineData("cm[H2O]", "76248-4", 8)]
    [InlineData("breaths/min", "19840-8", 18)]
    [InlineData("bpm", "19840-8", 18)]
    public void Without_a_system_a_ucum_code_or_a_known_spelling_is_taken(string unit, string code, double value)
    {
        var reading = One(Observation(Loinc(code), Unsystematic($"{value}", unit)));

        Assert.Equal((value, unit), (reading.Value, reading.GivenUnit));
    }

    [Theory]
    [InlineData("torr")]
    [InlineData("MMHG")]
    [InlineData("")]
    public void An_unknown_spelling_is_refused(string unit) =>
        Assert.Equal(Withheld.UnitUnknown, One(Observation(Loinc("2703-7"), Unsystematic("80", unit))).Refused);

    [Fact]
    public void A_spelling_under_the_ucum_system_is_refused()
    {
        Assert.Equal(Withheld.UnitUnknown, One(Peep(Quantity("8", "cmH2O"))).Refused);
        Assert.Equal(Withheld.UnitUnknown, One(Peep("""
            "valueQuantity":{"value":8,"unit":"cmH2O","system":"http://unitsofmeasure.org"}
            """)).Refused);
    }

    [Fact]
    public void A_unit_of_another_system_is_refused_even_when_it_looks_right() =>
        Assert.Equal(Withheld.UnitUnknown, One(Peep(Quantity("8", "cm[H2O]", "http://hospital.example/units"))).Refused);

    [Fact]
    public void A_unit_of_another_dimension_is_refused() =>
        Assert.Equal(Withheld.UnitUnknown, One(Observation(Loinc("19839-0"), Quantity("40", "%"))).Refused); // percent of breaths under the code of a rate

    [Theory]
    [InlineData("""
        "valueQuantity":{"value":8,"comparator":"<","unit":"cm[H2O]","system":"http://unitsofmeasure.org","code":"cm[H2O]"}
        """)]
    [InlineData("""
        "valueRange":{"low":{"value":5}}
        """)]
    [InlineData("""
        "valueRatio":{"numerator":{"value":1}}
        """)]
    [InlineData("""
        "valueString":"8 cmH2O"
        """)]
    [InlineData("""
        "valueQuantity":{"value":"8","system":"http://unitsofmeasure.org","code":"cm[H2O]"}
        """)]
    [InlineData("""
        "valueQuantity":{"value":1e40,"system":"http://unitsofmeasure.org","code":"cm[H2O]"}
        """)]
    [InlineData("""
        "valueQuantity":{"value":8,"system":"http://unitsofmeasure.org","code":"cm[H2O]"},"valueString":"9"
        """)]
    [InlineData("""
        "valueQuantity":{"value":8,"system":"http://unitsofmeasure.org","code":"cm[H2O]"},"valueQuantity":{"value":9,"system":"http://unitsofmeasure.org","code":"cm[H2O]"}
        """)]
    public void What_is_not_one_exact_number_is_refused(string value) => Assert.Equal(Withheld.ValueNotExact, One(Peep(value)).Refused);

    [Theory]
    [InlineData("""
        "dataAbsentReason":{"coding":[{"code":"not-performed"}]}
        """)]
    [InlineData("")]
    [InlineData("""
        "valueQuantity":{"system":"http://unitsofmeasure.org","code":"cm[H2O]"}
        """)]
    [InlineData("""
        "valueQuantity":{"value":8,"system":"http://unitsofmeasure.org","code":"cm[H2O]"},"dataAbsentReason":{"text":"sensor off"}
        """)]
    public void An_absent_value_blocks(string value) => Assert.Equal(Withheld.ValueAbsent, One(Peep(value)).Refused);

    [Fact]
    public void A_value_outside_the_plausible_range_is_refused_with_the_code_of_its_kind()
    {
        Assert.Equal(Withheld.InputInvalid, One(Peep(Quantity("500", "cm[H2O]"))).Refused);
        Assert.Equal(Kinds.Height.RangeCode, One(Observation(Loinc("8302-2"), Quantity("17", "cm"))).Refused);
    }

    [Fact]
    public void Of_several_refusals_the_first_in_the_order_of_precedence_is_given() =>
        Assert.Equal(Withheld.UnitUnknown, One(Observation(Loinc("2703-7"), Unsystematic("80", "torr"), status: "registered", effective: "\"issued\":\"2031-05-06T10:00:00Z\"")).Refused);
}
