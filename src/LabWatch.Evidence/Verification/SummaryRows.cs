using System.Diagnostics.CodeAnalysis;
using LabWatch.Readings;

namespace LabWatch.Evidence.Verification;

/// <summary>
/// Whether two summary rows tell the same: counts and extremes exactly, mean and squared deviations within what the order of adding
/// changes (the stored form keeps exact sums, the comparison adds one by one).
/// </summary>
internal sealed class SummaryRows : IEqualityComparer<ReadingSummary>
{
    private const double Relative = 1e-6;

    private SummaryRows()
    {
    }

    /// <summary>The one comparer.</summary>
    public static SummaryRows Comparer { get; } = new();

    public bool Equals(ReadingSummary x, ReadingSummary y)
    {
        double size = Math.Max(Math.Abs(x.Minimum), Math.Abs(x.Maximum));
        return x.Start == y.Start && x.Count == y.Count && x.First.Equals(y.First) && x.Last.Equals(y.Last)
            && x.Minimum.Equals(y.Minimum) && x.Maximum.Equals(y.Maximum)
            && IsNear(x.Mean, y.Mean, size) && IsNear(x.SumOfSquaredDeviations, y.SumOfSquaredDeviations, Math.Max(x.SumOfSquaredDeviations, size * size * Relative));
    }

    public int GetHashCode([DisallowNull] ReadingSummary obj) => HashCode.Combine(obj.Start, obj.Count, obj.First, obj.Last);

    private static bool IsNear(double left, double right, double size) => left.Equals(right) || Math.Abs(left - right) <= Relative * size;
}
