namespace LabWatch.Metrology.Statistics;

/// <summary>
/// Allan deviations of evenly spaced values with gaps (W. J. Riley, Handbook of Frequency Stability Analysis, NIST SP 1065, 2008, section 5): how far the means of
/// neighbouring intervals differ, by the length of the interval. A missing value is NaN. Each mean needs four fifths of its values, each sum of means as well; without
/// gaps every value is that of SP 1065.
/// </summary>
public static class AllanDeviation
{
    /// <summary>Part of the values that a mean needs.</summary>
    internal const double LeastPart = 0.8;

    /// <summary>Overlapping Allan deviation, SP 1065 equation (10) in terms of means.</summary>
    /// <param name="values">Values at one spacing, NaN where there is none.</param>
    /// <param name="m">Number of values in a mean, at least 1.</param>
    /// <returns>The deviation in the unit of the values; NaN where no two neighbouring means are there.</returns>
    public static AllanPoint Overlapping(ReadOnlySpan<double> values, int m) => Run(values, m, modified: false, step: 1);

    /// <summary>Modified Allan deviation, SP 1065 equation (16): differences averaged over m neighbours first, which tells white phase noise from flicker.</summary>
    /// <inheritdoc cref="Overlapping"/>
    public static AllanPoint Modified(ReadOnlySpan<double> values, int m) => Run(values, m, modified: true, step: 1);

    /// <summary>Allan deviation of means that do not overlap, SP 1065 equation (7).</summary>
    /// <inheritdoc cref="Overlapping"/>
    public static AllanPoint NonOverlapping(ReadOnlySpan<double> values, int m) => Run(values, m, modified: false, step: m);

    /// <summary>Overlapping and modified deviations at m = 1, 2, 4, ... as long as four means fit.</summary>
    /// <param name="values">Values at one spacing, NaN where there is none.</param>
    public static IReadOnlyList<(AllanPoint Overlapping, AllanPoint Modified)> Octaves(ReadOnlySpan<double> values)
    {
        List<(AllanPoint, AllanPoint)> points = [];
        using var sums = new GapSums(values);
        for (int m = 1; m <= values.Length / 4; m *= 2) points.Add((sums.Deviation(m, modified: false, 1), sums.Deviation(m, modified: true, 1)));
        return points;
    }

    /// <summary>Overlapping deviations at m = 1, 2, 4, ... as long as four means fit.</summary>
    /// <param name="values">Values at one spacing, NaN where there is none.</param>
    public static IReadOnlyList<AllanPoint> OverlappingOctaves(ReadOnlySpan<double> values)
    {
        List<AllanPoint> points = [];
        using var sums = new GapSums(values);
        for (int m = 1; m <= values.Length / 4; m *= 2) points.Add(sums.Deviation(m, modified: false, 1));
        return points;
    }

    private static AllanPoint Run(ReadOnlySpan<double> values, int m, bool modified, int step)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(m, 1);
        using var sums = new GapSums(values);
        return sums.Deviation(m, modified, step);
    }
}
