using LabWatch.Assessments.Evaluation;

namespace LabWatch.Tests.Assessments;

public sealed class QuantitiesTests
{
    [Theory]
    [InlineData(41.234, 6.17, "41.2", "6.2")]
    [InlineData(41.234, 61.7, "41", "62")]
    [InlineData(-0.04, 1.2, "0.0", "1.2")]
    [InlineData(300.00227, 0.00041, "300.00227", "0.00041")]
    public void A_value_is_rounded_to_the_place_of_its_uncertainty(double value, double expanded, string expectedValue, string expectedUncertainty)
    {
        Assert.Equal(expectedValue, Quantities.Value(value, expanded));
        Assert.Equal(expectedUncertainty, Quantities.Significant(expanded));
    }

    [Theory]
    [InlineData(0.99999, "over 99.9 %")]
    [InlineData(1, "100.0 %")]
    [InlineData(0.0000001, "under 0.1 %")]
    [InlineData(0.954499, "95.4 %")]
    public void A_probability_is_never_rounded_up_to_certainty(double probability, string expected) =>
        Assert.Equal(expected, Quantities.Percent(probability));
}
