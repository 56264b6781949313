using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;

namespace LabWatch.Assessments.Forecasts;

/// <summary>Runs the control charts over the days of a series.</summary>
internal static class DriftCharts
{
    /// <summary>The state after the last day; null while there are no more days than the reference takes, or where those do not scatter.</summary>
    public static ChartState? Of(IReadOnlyList<DayMean> days)
    {
        if (days.Count <= ChartRules.ReferenceDays)
        {
            return null;
        }

        double[] reference = [.. days.Take(ChartRules.ReferenceDays).Select(day => day.Value)];
        double target = reference.Average(), correlation = Correlation(reference, target);
        double sigma = Deviation(reference, target) * Math.Sqrt(1 - (correlation * correlation));
        if (!(sigma > 0))
        {
            return null;
        }

        EwmaChart average = new(ChartRules.Weight, ChartRules.EwmaLimit);
        CusumChart sums = new(ChartRules.ReferenceValue, ChartRules.CusumInterval);
        Instant? since = null;
        for (int i = ChartRules.ReferenceDays; i < days.Count; i++)
        {
            // An independent residual of a first-order autoregressive series; a lasting shift s of the mean becomes s (1 - r).
            double residual = (days[i].Value - target - (correlation * (days[i - 1].Value - target))) / sigma;
            average.Add(residual);
            sums.Add(residual);
            bool signals = average.Signals || sums.SignalsIncrease || sums.SignalsDecrease;
            since = signals ? since ?? days[i].At : null;
        }

        string signal = since is null ? "none" : average.Average > 0 ? "increase" : "decrease";
        return new(
            ChartRules.ReferenceDays, days.Count - ChartRules.ReferenceDays, target, sigma, correlation, average.Average, average.Limit, sums.Upper, sums.Lower,
            ChartRules.CusumInterval, signal, since);
    }

    private static double Deviation(double[] values, double mean) => Math.Sqrt(values.Sum(value => (value - mean) * (value - mean)) / (values.Length - 1));

    /// <summary>Lag-one correlation with the correction for the bias of a short series, (n r + 1)/(n - 3) (Kendall 1954, one fitted mean); a negative one counts as 0.</summary>
    private static double Correlation(double[] values, double mean)
    {
        double products = 0, squares = 0;
        for (int i = 0; i < values.Length; i++)
        {
            squares += (values[i] - mean) * (values[i] - mean);
            products += i == 0 ? 0 : (values[i] - mean) * (values[i - 1] - mean);
        }

        int n = values.Length;
        return squares > 0 ? Math.Clamp(((n * products / squares) + 1) / (n - 3), 0, 0.9) : 0;
    }
}
