using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Hazards;

/// <summary>
/// Newton's law of cooling fitted to recent readings of one sensor (least squares in temperature, ambient temperature given), and the time until
/// it falls below a threshold with an interval. The interval holds the scatter of the readings, widened for their autocorrelation, the
/// uncertainty of the ambient temperature, and what the law does not describe: the difference to the forecast from the later half alone.
/// </summary>
public static class CoolingCurve
{
    /// <summary>Fewest readings that a forecast is made from.</summary>
    public const int MinimumCount = 12;

    private const int MaximumSteps = 60;

    /// <summary>Forecasts the passing of a threshold.</summary>
    /// <param name="seconds">Times of the readings, seconds, rising.</param>
    /// <param name="celsius">Readings, degree Celsius, finite, as many.</param>
    /// <param name="ambientCelsius">Ambient temperature with its standard uncertainty.</param>
    /// <param name="thresholdCelsius">Threshold, degree Celsius.</param>
    /// <param name="coverageProbability">Coverage probability of the interval.</param>
    /// <returns>Null where nothing can be told: too few readings, not cooling, or a threshold that is not above the ambient temperature.</returns>
    public static CoolingForecast? Forecast(
        ReadOnlySpan<double> seconds,
        ReadOnlySpan<double> celsius,
        Estimate ambientCelsius,
        double thresholdCelsius,
        double coverageProbability = CoverageFactor.DefaultProbability)
    {
        int n = seconds.Length;
        if (n < MinimumCount || celsius.Length != n || !(thresholdCelsius > ambientCelsius.Value))
        {
            return null;
        }

        double ambient = ambientCelsius.Value;
        if (Fit(seconds, celsius, ambient) is not { } whole || Fit(seconds[(n / 2)..], celsius[(n / 2)..], ambient) is not { } late)
        {
            return null;
        }

        double best = whole.TimeTo(thresholdCelsius - ambient);
        double step = Math.Max(1e-3, ambientCelsius.StandardUncertainty);
        double fromAmbient = ambientCelsius.StandardUncertainty > 0 && Fit(seconds, celsius, ambient - step) is { } shifted
            ? shifted.TimeTo(thresholdCelsius - ambient + step) - best
            : 0;
        double fromLaw = late.TimeTo(thresholdCelsius - ambient) - best;
        double u = Math.Sqrt(whole.TimeVariance(thresholdCelsius - ambient) + (fromAmbient * fromAmbient) + (fromLaw * fromLaw));
        double degrees = Math.Max(1, whole.EffectiveCount - 2);
        double reach = CoverageFactor.For(degrees, coverageProbability) * u;
        Estimate time = best > 0 ? new(best, u, degrees) : new(0, u, degrees);
        return new(
            new(1 / whole.Rate, whole.RateDeviation / (whole.Rate * whole.Rate), degrees),
            time,
            Math.Max(0, time.Value - reach),
            time.Value + reach,
            whole.Residual);
    }

    /// <summary>Gauss-Newton on amplitude and rate, time counted from the last reading.</summary>
    private static CoolingFit? Fit(ReadOnlySpan<double> seconds, ReadOnlySpan<double> celsius, double ambient)
    {
        int n = seconds.Length;
        double end = seconds[n - 1];
        double amplitude = celsius[n - 1] - ambient;
        double start = celsius[0] - ambient;
        if (!(amplitude > 0 && start > amplitude && end > seconds[0]))
        {
            return null;
        }

        double rate = Math.Log(start / amplitude) / (end - seconds[0]);
        CoolingNormals normals = default;
        for (int step = 0; step < MaximumSteps; step++)
        {
            normals = CoolingNormals.Of(seconds, celsius, ambient, amplitude, rate);
            (double amplitudeStep, double rateStep) = normals.Solve();
            amplitude += amplitudeStep;
            rate += rateStep;
            if (!(amplitude > 0 && rate > 0))
            {
                return null;
            }

            if (Math.Abs(rateStep) < 1e-12 * rate && Math.Abs(amplitudeStep) < 1e-12 * amplitude)
            {
                break;
            }
        }

        return CoolingFit.Of(CoolingNormals.Of(seconds, celsius, ambient, amplitude, rate), amplitude, rate, n);
    }
}
