namespace RespDerive.Physiology.Tests;

/// <summary>
/// Predicted body weight by height as tabulated by the ARDS Network (ventilator protocol card; formula N Engl J Med 2000;342:1301).
/// The table uses 2.3 kg per inch, the definition 0.91 kg per cm, which is up to 0.2 kg apart. Card values from memory.
/// </summary>
public sealed class PublishedTableTests
{
    [Theory]
    [InlineData("female", 58, 40.9)]
    [InlineData("female", 60, 45.5)]
    [InlineData("female", 62, 50.1)]
    [InlineData("female", 64, 54.7)]
    [InlineData("female", 66, 59.3)]
    [InlineData("female", 68, 63.9)]
    [InlineData("female", 70, 68.5)]
    [InlineData("female", 72, 73.1)]
    [InlineData("female", 74, 77.7)]
    [InlineData("female", 76, 82.3)]
    [InlineData("male", 60, 50.0)]
    [InlineData("male", 62, 54.6)]
    [InlineData("male", 64, 59.2)]
    [InlineData("male", 66, 63.8)]
    [InlineData("male", 68, 68.4)]
    [InlineData("male", 70, 73.0)]
    [InlineData("male", 72, 77.6)]
    [InlineData("male", 74, 82.2)]
    [InlineData("male", 76, 86.8)]
    public void Predicted_body_weight_follows_the_published_table(string sex, double inches, double kilograms)
    {
        var computed = ByHand.Compute(CatalogueData.Of("predicted-body-weight"), [("sex", sex), ("height", inches, "[in_i]"), ("age", 50, "a")]);
        Assert.Equal(kilograms, computed.Computation.Value, 0.2);
        Assert.Empty(computed.Computation.Flags);
    }
}
