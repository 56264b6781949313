using LabWatch.Simulator.Noise;

namespace LabWatch.Simulator.Room;

/// <summary>
/// Air of the laboratory as a pure function of time: air conditioning with a day cycle, slow weather behind it, moisture that follows the weather.
/// Time is in whole seconds since 1970 UTC.
/// </summary>
internal sealed class RoomClimate
{
    private const double SecondsPerDay = 86400;
    private const double ConditioningPeriodSecond = 780;

    private readonly long _seed;
    private readonly double[] _phases;

    /// <summary>A climate drawn from a seed.</summary>
    public RoomClimate(long seed)
    {
        _seed = seed;
        _phases = [.. Enumerable.Range(0, 8).Select(i => Math.Tau * CounterNoise.Uniform(seed, CounterNoise.Stream("climate"), i))];
    }

    /// <summary>Moves to a moment.</summary>
    public void Set(long second)
    {
        double day = second / SecondsPerDay;
        double weather = (0.5 * Wave(day, 5.3, 0)) + (0.35 * Wave(day, 2.2, 1)) + (0.25 * Wave(day, 11.7, 2));
        double daily = Math.Cos(Math.Tau * (day - 0.62));
        double conditioning = 0.06 * Math.Sin((Math.Tau * second / ConditioningPeriodSecond) + _phases[3]);
        double draught = 0.03 * CounterNoise.Slow(_seed, DraughtStream, second, 60);
        AirCelsius = 21.6 + (0.45 * weather) + (0.55 * daily) + conditioning + draught;
        double moisture = (0.6 * Wave(day, 6.1, 4)) + (0.4 * Wave(day, 2.9, 5)) + (0.15 * daily);
        DewPointCelsius = 8.5 + (2.5 * moisture) + (0.05 * CounterNoise.Slow(_seed, MoistureStream, second, 300));
    }

    /// <summary>Air temperature, degree Celsius.</summary>
    public double AirCelsius { get; private set; }

    /// <summary>Dew point of the room's air, degree Celsius.</summary>
    public double DewPointCelsius { get; private set; }

    /// <summary>Relative humidity, percent.</summary>
    public double RelativeHumidity => 100 * SaturationPressure(DewPointCelsius) / SaturationPressure(AirCelsius);

    /// <summary>Saturation vapour pressure over water, hectopascal (Magnus formula with the coefficients of Sonntag 1990).</summary>
    internal static double SaturationPressure(double celsius) => 6.112 * Math.Exp(17.62 * celsius / (243.12 + celsius));

    private static readonly long DraughtStream = CounterNoise.Stream("draught");
    private static readonly long MoistureStream = CounterNoise.Stream("moisture");

    private double Wave(double day, double periodDay, int phase) => Math.Sin((Math.Tau * day / periodDay) + _phases[phase]);
}
