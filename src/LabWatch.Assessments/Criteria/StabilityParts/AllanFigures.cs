using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>
/// Overlapping Allan deviation of the ten-second means of a window at 10, 20, 40 ... s (W. J. Riley, NIST SP 1065, 2008): how far the means of neighbouring intervals differ, by their length. It tells
/// for how long a comparison may be averaged before the wander of the source takes over, which half-range and standard deviation do not. Its uncertainty is that for white noise.
/// </summary>
internal static class AllanFigures
{
    private static readonly TimeSpan Bin = TimeSpan.FromMicroseconds(Stability.TenSeconds);

    public static IEnumerable<AssessmentFigure> Of(StabilityEvidence evidence, string unit, double factor)
    {
        foreach (AllanPoint point in AllanDeviation.OverlappingOctaves(Grid(evidence)))
        {
            if (double.IsFinite(point.Deviation))
            {
                yield return new($"allan-{Quantities.Count((int)(point.M * Bin.TotalSeconds))}-s", new(point.Deviation * factor, point.Deviation * factor / Math.Sqrt(2 * point.DegreesOfFreedom), point.DegreesOfFreedom), unit);
            }
        }
    }

    /// <summary>One value each ten seconds of the window, NaN where there is no reading.</summary>
    private static double[] Grid(StabilityEvidence evidence)
    {
        TemperatureSeries within = evidence.Within;
        double[] grid = new double[(int)(evidence.Window.Duration / Bin)];
        Array.Fill(grid, double.NaN);
        long[] starts = new long[within.Count];
        double[] means = new double[within.Count];
        int bins = TimeBins.Means(within.TimeMicroseconds.Span, within.Celsius.Span, Stability.TenSeconds, starts, means);
        long first = TimeBins.StartOf(evidence.Window.Start.Microseconds, Stability.TenSeconds);
        for (int i = 0; i < bins; i++)
        {
            long place = (starts[i] - first) / Stability.TenSeconds;
            if (place >= 0 && place < grid.Length)
            {
                grid[place] = means[i];
            }
        }

        return grid;
    }
}
