using LabWatch.Metrology.Thermometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class CorrectionTableTests
{
    private static readonly CorrectionTable Table = new([new(0, 0.10), new(50, 0.20), new(100, -0.10)]);

    [Theory]
    [InlineData(0, 0.10)]
    [InlineData(25, 25.15)]
    [InlineData(50, 50.20)]
    [InlineData(75, 75.05)]
    [InlineData(100, 99.90)]
    public void Evaluate_InsideTheTable_InterpolatesLinearly(double indicated, double expected)
    {
        TemperatureEvaluation evaluation = Table.Evaluate(indicated, 0.02);

        Assert.Equal(expected, evaluation.Celsius.Value, 1e-12);
        Assert.True(evaluation.InRange);
        Assert.Equal(0.02, evaluation.Celsius.StandardUncertainty);
    }

    [Theory]
    [InlineData(-5, -4.90)]
    [InlineData(120, 119.90)]
    public void Evaluate_OutsideTheTable_KeepsTheNearestCorrectionAndFlags(double indicated, double expected)
    {
        TemperatureEvaluation evaluation = Table.Evaluate(indicated, 0.02);

        Assert.Equal(expected, evaluation.Celsius.Value, 1e-12);
        Assert.False(evaluation.InRange);
        Assert.True(double.IsNaN(evaluation.Celsius.StandardUncertainty));
    }

    [Fact]
    public void Evaluate_SensitivityIsOnePlusTheSlopeOfTheCorrection()
    {
        Assert.Equal(1 - (0.30 / 50), Table.Evaluate(60, 0.02).Sensitivity, 1e-12);
    }

    [Fact]
    public void Evaluate_SinglePoint_IsAConstantCorrectionEverywhere()
    {
        TemperatureEvaluation evaluation = new CorrectionTable([new(20, 0.3)]).Evaluate(400, 0.05);

        Assert.Equal(400.3, evaluation.Celsius.Value, 1e-12);
        Assert.True(evaluation.InRange);
    }

    [Fact]
    public void Evaluate_NaN_GivesNoValue()
    {
        Assert.Equal(TemperatureEvaluation.None, Table.Evaluate(double.NaN, 0.02));
    }
}
