namespace LabWatch.Assessments.Forecasts;

/// <summary>Constants of the control charts of day means.</summary>
public static class ChartRules
{
    /// <summary>Days that target and standard deviation are taken from.</summary>
    public const int ReferenceDays = 10;

    /// <summary>Weight of the newest day in the moving average (ISO 7870-6 recommends 0.2 to 0.3 for shifts of about one standard deviation).</summary>
    public const double Weight = 0.2;

    /// <summary>Reference value of the cumulative sums: half of the shift to be found, one standard deviation (ISO 7870-4).</summary>
    public const double ReferenceValue = 0.5;

    /// <summary>Average run length of each chart without a change, days.</summary>
    public const double RunLength = 1000;

    private static readonly Lazy<double> LazyLimit = new(FindLimit);
    private static readonly Lazy<double> LazyInterval = new(() => Metrology.Statistics.RunLength.CusumInterval(ReferenceValue, RunLength));
    private static readonly Lazy<double> LazyEwmaAtOne = new(() => Metrology.Statistics.RunLength.OfEwma(Weight, EwmaLimit, 1));
    private static readonly Lazy<double> LazyCusumAtOne = new(() => Metrology.Statistics.RunLength.OfTwoSidedCusum(ReferenceValue, CusumInterval, 1));

    /// <summary>Limit of the moving average, in its own standard deviations, for <see cref="RunLength"/>.</summary>
    public static double EwmaLimit => LazyLimit.Value;

    /// <summary>Decision interval of the cumulative sums for <see cref="RunLength"/>.</summary>
    public static double CusumInterval => LazyInterval.Value;

    /// <summary>Average run length of the moving average at a shift of one standard deviation, days.</summary>
    public static double EwmaRunLengthAtOne => LazyEwmaAtOne.Value;

    /// <summary>Average run length of the cumulative sums at a shift of one standard deviation, days.</summary>
    public static double CusumRunLengthAtOne => LazyCusumAtOne.Value;

    private static double FindLimit()
    {
        double low = 2, high = 4;
        for (int i = 0; i < 40; i++)
        {
            double middle = (low + high) / 2;
            (low, high) = Metrology.Statistics.RunLength.OfEwma(Weight, middle, 0) < RunLength ? (middle, high) : (low, middle);
        }

        return (low + high) / 2;
    }
}
