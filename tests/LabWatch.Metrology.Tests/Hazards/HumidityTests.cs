using FsCheck.Xunit;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Hazards;

public sealed class HumidityTests
{
    [Property]
    public bool Humidity_of_the_dew_point_is_the_humidity(byte formulaDraw, byte temperatureDraw, byte humidityDraw)
    {
        SaturationFormula formula = Enum.GetValues<SaturationFormula>()[formulaDraw % 4];
        double celsius = -20 + (60.0 * temperatureDraw / byte.MaxValue);
        double relative = 1 + (99.0 * humidityDraw / byte.MaxValue);
        double dewPoint = Humidity.DewPoint(new Estimate(celsius, 0), new Estimate(relative, 0), formula).Value;
        return Math.Abs(Humidity.RelativeOfDewPoint(celsius, dewPoint, formula) - relative) < 1e-7;
    }

    [Fact]
    public void Dew_point_of_saturated_air_is_its_temperature()
    {
        Assert.Equal(17, Humidity.DewPoint(new Estimate(17, 0), new Estimate(100, 0)).Value, 1e-9);
    }

    [Fact]
    public void Uncertainty_agrees_with_Monte_Carlo()
    {
        Estimate celsius = new(23, 0.2);
        Estimate relative = new(45, 1);
        UncertaintyBudget inputs = new([new("t", celsius, 1), new("rh", relative, 1)]);

        MonteCarloResult drawn = MonteCarloPropagation.Run(
            inputs,
            values => Humidity.DewPoint(new Estimate(values[0], 0), new Estimate(values[1], 0)).Value,
            new MonteCarloOptions { Trials = 20_000 });

        Assert.Equal(drawn.StandardUncertainty, Humidity.DewPoint(celsius, relative).StandardUncertainty, 0.01);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    public void Dry_or_impossible_air_has_no_dew_point(double relative)
    {
        Assert.False(Humidity.DewPoint(new Estimate(23, 0), new Estimate(relative, 0)).HasValue);
    }

    [Fact]
    public void Condensation_point_is_the_frost_point_below_zero_and_the_dew_point_above()
    {
        Assert.Equal(Humidity.FrostPoint(new Estimate(23, 0), new Estimate(10, 0)).Value, Humidity.CondensationPoint(23, 10), 1e-9);
        Assert.Equal(Humidity.DewPoint(new Estimate(23, 0), new Estimate(45, 0)).Value, Humidity.CondensationPoint(23, 45), 1e-9);
    }
}
