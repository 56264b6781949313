using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Hazards;

public sealed class CoolingCurveTests
{
    private const double Ambient = 23;
    private const double TimeConstant = 3600;

    [Fact]
    public void Forecast_OfTheExactLaw_IsTheClosedForm()
    {
        (double[] seconds, double[] celsius) = Readings(300, 10, 500, noise: 0, seed: 1);

        CoolingForecast forecast = CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0), 48)!;

        Assert.Equal(TimeConstant, forecast.TimeConstantSeconds.Value, 1e-3);
        Assert.Equal(NewtonCooling.TimeTo(celsius[^1], Ambient, TimeConstant, 48), forecast.SecondsToThreshold.Value, 1e-2);
    }

    [Fact]
    public void Interval_holds_the_true_time_as_often_as_it_says()
    {
        int inside = 0;
        for (ulong seed = 1; seed <= 200; seed++)
        {
            (double[] seconds, double[] celsius) = Readings(120, 10, 300, noise: 0.5, seed);
            CoolingForecast forecast = CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0), 48)!;
            double truth = NewtonCooling.TimeTo(300, Ambient, TimeConstant, 48) - seconds[^1];
            inside += truth >= forecast.EarliestSeconds && truth <= forecast.LatestSeconds ? 1 : 0;
        }

        // At least the 95.45 % asked for, less three binomial standard deviations; the share for the law makes it wider.
        Assert.True(inside >= 182, $"{inside} of 200");
    }

    [Fact]
    public void Interval_holds_the_true_time_of_a_body_with_two_time_constants()
    {
        double[] seconds = [.. Enumerable.Range(0, 360).Select(i => i * 10.0)];
        double[] celsius = [.. seconds.Select(Body)];

        CoolingForecast forecast = CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0.5), 60)!;

        double truth = Enumerable.Range(0, 100_000).Select(i => i + seconds[^1]).First(time => Body(time) < 60) - seconds[^1];
        Assert.InRange(truth, forecast.EarliestSeconds, forecast.LatestSeconds);

        static double Body(double time) => Ambient + (150 * Math.Exp(-time / 1500)) + (100 * Math.Exp(-time / 9000));
    }

    [Fact]
    public void Uncertain_ambient_temperature_widens_the_interval()
    {
        (double[] seconds, double[] celsius) = Readings(300, 10, 300, noise: 0.1, seed: 4);

        CoolingForecast certain = CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0), 48)!;
        CoolingForecast uncertain = CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 2), 48)!;

        Assert.True(uncertain.LatestSeconds > certain.LatestSeconds);
    }

    [Fact]
    public void Forecast_BelowTheThresholdAlready_IsZero()
    {
        (double[] seconds, double[] celsius) = Readings(300, 10, 60, noise: 0, seed: 1);

        Assert.Equal(0, CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0), 59)!.SecondsToThreshold.Value);
    }

    [Theory]
    [InlineData(Ambient)]
    [InlineData(Ambient - 1)]
    public void Forecast_ThresholdNotAboveAmbient_CannotBeTold(double threshold)
    {
        (double[] seconds, double[] celsius) = Readings(300, 10, 300, noise: 0, seed: 1);

        Assert.Null(CoolingCurve.Forecast(seconds, celsius, new Estimate(Ambient, 0), threshold));
    }

    [Fact]
    public void Forecast_OfASourceThatIsNotCooling_CannotBeTold()
    {
        double[] seconds = [.. Enumerable.Range(0, 100).Select(i => (double)i)];

        Assert.Null(CoolingCurve.Forecast(seconds, [.. seconds.Select(_ => 300.0)], new Estimate(Ambient, 0), 48));
        Assert.Null(CoolingCurve.Forecast(seconds, [.. seconds.Select(time => 300 + time)], new Estimate(Ambient, 0), 48));
        Assert.Null(CoolingCurve.Forecast(seconds.AsSpan(0, 5), [300, 290, 280, 270, 260], new Estimate(Ambient, 0), 48));
    }

    private static (double[] Seconds, double[] Celsius) Readings(int count, double step, double start, double noise, ulong seed)
    {
        Xoshiro256 random = new(seed);
        double[] seconds = new double[count];
        double[] celsius = new double[count];
        for (int i = 0; i < count; i++)
        {
            seconds[i] = i * step;
            celsius[i] = NewtonCooling.TemperatureAfter(start, Ambient, TimeConstant, seconds[i]) + (noise * Ziggurat.Next(ref random));
        }

        return (seconds, celsius);
    }
}
