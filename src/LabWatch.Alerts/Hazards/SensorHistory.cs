using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Alerts.Hazards;

/// <summary>The last ten minutes of one thermometer, thinned to one value each 10 s, in a ring of fixed size. Guarded by the lock of its source.</summary>
internal sealed class SensorHistory
{
    private const int Places = 64;
    private const double Spacing = 10;
    private const double LongestTrend = 300;
    private const double ShortestTrend = 60;

    private readonly double[] _seconds = new double[Places];
    private readonly double[] _celsius = new double[Places];
    private int _next;
    private int _count;

    /// <summary>Adds a value; one that comes sooner than 10 s after the last is left out.</summary>
    public void Add(double seconds, double celsius)
    {
        if (double.IsNaN(celsius) || (_count > 0 && seconds - _seconds[At(1)] < Spacing - 0.5))
        {
            return;
        }

        _seconds[_next] = seconds;
        _celsius[_next] = celsius;
        _next = (_next + 1) % Places;
        _count = Math.Min(_count + 1, Places);
    }

    /// <summary>How much the thermometer has changed over the last minutes, at most five; null where less than one is known.</summary>
    public (double Kelvin, double Seconds)? Trend()
    {
        for (int back = _count; back > 1; back--)
        {
            double length = _seconds[At(1)] - _seconds[At(back)];
            if (length is >= ShortestTrend and <= LongestTrend)
            {
                return (_celsius[At(1)] - _celsius[At(back)], length);
            }
        }

        return null;
    }

    /// <summary>When a cooling thermometer is expected to fall below a threshold; null where that cannot be told.</summary>
    public CoolingForecast? Forecast(Estimate ambient, double threshold)
    {
        double[] seconds = new double[_count];
        double[] celsius = new double[_count];
        for (int i = 0; i < _count; i++)
        {
            seconds[i] = _seconds[At(_count - i)];
            celsius[i] = _celsius[At(_count - i)];
        }

        return CoolingCurve.Forecast(seconds, celsius, ambient, threshold);
    }

    private int At(int back) => (_next + Places - back) % Places;
}
