using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// Standard error of a mean over a window by batch means: the window is cut into six equal parts, whose means scatter with the noise that
/// lasts up to a part's length and with the drift. Works where readings are correlated (G. S. Fishman, Management Science 24 (1978) 510-521).
/// </summary>
internal static class BatchMeans
{
    /// <summary>Number of parts; the standard error has one degree of freedom less.</summary>
    public const int Parts = 6;

    /// <summary>The standard error; NaN where a part has no value.</summary>
    public static double StandardError(ReadOnlySpan<long> timeMicroseconds, ReadOnlySpan<double> values, TimeWindow window)
    {
        Span<double> sums = stackalloc double[Parts];
        Span<int> counts = stackalloc int[Parts];
        sums.Clear();
        counts.Clear();
        double length = window.Duration.TotalMicroseconds / Parts;
        for (int i = 0; i < values.Length; i++)
        {
            int part = Math.Clamp((int)((timeMicroseconds[i] - window.Start.Microseconds) / length), 0, Parts - 1);
            sums[part] += values[i];
            counts[part]++;
        }

        double mean = 0;
        for (int part = 0; part < Parts; part++)
        {
            if (counts[part] == 0)
            {
                return double.NaN;
            }

            sums[part] /= counts[part];
            mean += sums[part] / Parts;
        }

        double squares = 0;
        foreach (double part in sums)
        {
            squares += (part - mean) * (part - mean);
        }

        return Math.Sqrt(squares / (Parts - 1) / Parts);
    }
}
