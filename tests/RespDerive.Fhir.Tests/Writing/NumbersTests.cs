using System.Globalization;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class NumbersTests
{
    private static string Text(decimal value) => value.ToString(CultureInfo.InvariantCulture);

    [Theory]
    [InlineData(9.81234, "9.8")]
    [InlineData(2.0412, "2.0")]
    [InlineData(0.0996, "0.10")]
    [InlineData(0.00123, "0.0012")]
    [InlineData(24.5, "25")]
    [InlineData(123.4, "120")]
    [InlineData(0, "0")]
    public void Uncertainties_have_two_digits(double value, string written) => Assert.Equal(written, Text(Numbers.Uncertainty(value)));

    [Theory]
    [InlineData(0.5, "0.5")]
    [InlineData(90.00753066110619, "90.0075")]
    [InlineData(760, "760")]
    [InlineData(-12.5, "-12.5")]
    [InlineData(1234567.8, "1234570")]
    public void Values_to_read_have_six(double value, string written) => Assert.Equal(written, Text(Numbers.Shown(value)));

    [Fact]
    public void Values_to_recompute_from_keep_fifteen() => Assert.Equal("90.0075306611062", Text(Numbers.Exact(90.00753066110619)));
}
