using LabWatch.Metrology.Thermometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class CharacteristicPolynomialTests
{
    private static readonly CharacteristicPolynomial Polynomial = new([1, 2, 3], 0, 10);

    [Fact]
    public void Evaluate_InsideTheRange_GivesValueAndSlope()
    {
        TemperatureEvaluation evaluation = Polynomial.Evaluate(2, 0.1);

        Assert.Equal(17, evaluation.Celsius.Value, 1e-12);
        Assert.Equal(14, evaluation.Sensitivity, 1e-12);
    }

    [Theory]
    [InlineData(-0.1)]
    [InlineData(10.1)]
    [InlineData(double.NaN)]
    public void Evaluate_OutsideTheRange_GivesNoValue(double raw)
    {
        Assert.Equal(TemperatureEvaluation.None, Polynomial.Evaluate(raw, 0.1));
    }
}
