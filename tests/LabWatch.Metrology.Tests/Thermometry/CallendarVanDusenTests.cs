using FsCheck.Xunit;
using LabWatch.Metrology.Thermometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class CallendarVanDusenTests
{
    private static readonly CallendarVanDusen Pt100 = CallendarVanDusen.Nominal(100);

    [Property]
    public bool Inverse_of_the_equation_is_the_identity_over_the_whole_range(ushort draw)
    {
        double celsius = CallendarVanDusen.MinimumCelsius + (1050.0 * draw / ushort.MaxValue);
        return Math.Abs(Pt100.CelsiusOf(Pt100.ResistanceOhm(celsius)) - celsius) < 1e-10;
    }

    [Property]
    public bool Slope_is_the_derivative_of_the_equation(ushort draw)
    {
        double celsius = CallendarVanDusen.MinimumCelsius + (1050.0 * draw / ushort.MaxValue);
        double difference = (Pt100.ResistanceOhm(celsius + 1e-3) - Pt100.ResistanceOhm(celsius - 1e-3)) / 2e-3;
        return Math.Abs(Pt100.SlopeOhmPerKelvin(celsius) - difference) < 1e-7;
    }

    [Theory]
    [InlineData(double.NaN)]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.PositiveInfinity)]
    [InlineData(1e6)]
    public void Evaluate_ResistanceWithoutTemperature_GivesNoValue(double ohm)
    {
        Assert.Equal(TemperatureEvaluation.None, Pt100.Evaluate(ohm, 0.01));
    }

    [Theory]
    [InlineData(18.0)]
    [InlineData(395.0)]
    public void Evaluate_OutsideTheRangeOfTheStandard_KeepsTheFlaggedValueWithoutUncertainty(double ohm)
    {
        TemperatureEvaluation evaluation = Pt100.Evaluate(ohm, 0.01);

        Assert.True(evaluation.HasValue);
        Assert.False(evaluation.InRange);
        Assert.True(double.IsNaN(evaluation.Celsius.StandardUncertainty));
    }

    [Fact]
    public void Evaluate_InRange_CarriesUncertaintyAndReciprocalSlope()
    {
        TemperatureEvaluation evaluation = Pt100.Evaluate(138.5055, 0.01);

        Assert.Equal(100, evaluation.Celsius.Value, 1e-9);
        Assert.Equal(0.01, evaluation.Celsius.StandardUncertainty);
        Assert.Equal(1 / 0.37928, evaluation.Sensitivity, 1e-4);
        Assert.True(evaluation.InRange);
    }
}
