namespace LabWatch.Metrology.Statistics;

/// <summary>Cumulative sums of standardised residuals on both sides (ISO 7870-4; E. S. Page 1954), with a head start where a fault may be there from the beginning.</summary>
/// <param name="k">Reference value in standard deviations, half of the shift to be found.</param>
/// <param name="h">Decision interval in standard deviations.</param>
/// <param name="start">Head start of both sums, from 0 to h.</param>
public sealed class CusumChart(double k, double h, double start = 0)
{
    /// <summary>Sum for an increase.</summary>
    public double Upper { get; private set; } = start;

    /// <summary>Sum for a decrease, positive.</summary>
    public double Lower { get; private set; } = start;

    /// <summary>Whether the sum for an increase exceeds the interval.</summary>
    public bool SignalsIncrease => Upper > h;

    /// <summary>Whether the sum for a decrease exceeds the interval.</summary>
    public bool SignalsDecrease => Lower > h;

    /// <summary>Takes the next independent standardised residual; NaN changes nothing.</summary>
    public void Add(double residual)
    {
        if (!double.IsFinite(residual)) return;
        Upper = Math.Max(0, Upper + residual - k);
        Lower = Math.Max(0, Lower - residual - k);
    }
}
