using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>
/// Control charts of standardised, independent residuals: EWMA (ISO 7870-6; J. M. Lucas and M. S. Saccucci 1990) and CUSUM (ISO 7870-4; E. S. Page 1954), with mean run lengths of a year of ten-minute
/// values while nothing changes. Values beyond 4 standard deviations count as 4, so that one disturbed block is no change.
/// </summary>
/// <param name="Ewma">The average at the end, in standard deviations of a value.</param>
/// <param name="EwmaSignals">Whether it lies outside of its limits.</param>
/// <param name="CusumUp">Sum for an increase at the end.</param>
/// <param name="CusumDown">Sum for a decrease at the end.</param>
/// <param name="Change">When it changed, where a chart signals; null where none does.</param>
internal sealed record BalanceChart(double Ewma, bool EwmaSignals, double CusumUp, double CusumDown, BalanceChange? Change)
{
    /// <summary>Weight of the newest value.</summary>
    public const double Lambda = 0.1;

    /// <summary>Limits of the average in its standard deviations: mean run length 52 560 values or more.</summary>
    public const double EwmaLimit = 4.2;

    /// <summary>Reference value of the sums: half of the shift to be found.</summary>
    public const double Reference = 0.5;

    /// <summary>Decision interval of the sums: mean run length 52 560 values or more.</summary>
    public const double Interval = 9.8;

    private const double Largest = 4;

    /// <summary>Half of the chi-squared of one degree of freedom at 95 %: what the log-likelihood may fall by.</summary>
    private const double LikelihoodDrop = 1.92;

    public bool CusumSignals => CusumUp > Interval || CusumDown > Interval;

    public bool Signals => EwmaSignals || CusumSignals;

    public static BalanceChart Of(BalanceResiduals residuals)
    {
        EwmaChart ewma = new(Lambda, EwmaLimit);
        CusumChart cusum = new(Reference, Interval);
        List<(Instant At, double Value)> values = [.. residuals.Independent().Select(value => (value.At, Math.Clamp(value.Value, -Largest, Largest)))];
        foreach ((Instant _, double value) in values)
        {
            ewma.Add(value);
            cusum.Add(value);
        }

        bool signals = ewma.Signals || cusum.SignalsIncrease || cusum.SignalsDecrease;
        return new(ewma.Average, ewma.Signals, cusum.Upper, cusum.Lower, signals ? Dated(values) : null);
    }

    /// <summary>
    /// The likelihood of a step from the baseline that lasts (D. V. Hinkley, Biometrika 57 (1970) 1-17): of a step before value j the log-likelihood is (sum from j)^2/(2 (n - j)); the interval holds all
    /// j that come within 1.92 of the largest.
    /// </summary>
    private static BalanceChange Dated(List<(Instant At, double Value)> values)
    {
        double[] gain = new double[values.Count];
        double sum = 0;
        for (int j = values.Count - 1; j >= 0; j--)
        {
            sum += values[j].Value;
            gain[j] = sum * sum / (2 * (values.Count - j));
        }

        int best = Array.IndexOf(gain, gain.Max());
        int first = Array.FindIndex(gain, value => value >= gain[best] - LikelihoodDrop), last = Array.FindLastIndex(gain, value => value >= gain[best] - LikelihoodDrop);
        return new(values[best].At, first == 0 ? null : values[first - 1].At, values[last].At);
    }
}
