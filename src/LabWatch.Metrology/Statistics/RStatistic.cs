namespace LabWatch.Metrology.Statistics;

/// <summary>
/// The ratio of two filtered estimates of the noise variance that tells a steady state: near 1 while a value is steady, larger while it moves
/// (S. Cao and R. R. Rhinehart, J. Process Control 5 (1995) 363-374). Readings must be independent: thin them beyond their correlation time.
/// </summary>
public sealed class RStatistic
{
    private readonly double _lambda1;
    private readonly double _lambda2;
    private readonly double _lambda3;
    private double _filtered;
    private double _aboutFilter;
    private double _aboutLast;
    private double _last;

    /// <summary>Starts before the first value.</summary>
    /// <param name="lambda1">Factor of the filter of the value, above 0, at most 1.</param>
    /// <param name="lambda2">Factor of the filter of the squared distance from the filtered value.</param>
    /// <param name="lambda3">Factor of the filter of the squared difference of neighbours.</param>
    public RStatistic(double lambda1 = 0.2, double lambda2 = 0.1, double lambda3 = 0.1) => (_lambda1, _lambda2, _lambda3) = (lambda1, lambda2, lambda3);

    /// <summary>Number of values taken.</summary>
    public int Count { get; private set; }

    /// <summary>The ratio; NaN before the second value and where all values were equal.</summary>
    public double Ratio => _aboutLast > 0 ? (2 - _lambda1) * _aboutFilter / _aboutLast : double.NaN;

    /// <summary>Takes the next value.</summary>
    public void Add(double value)
    {
        if (Count++ == 0)
        {
            (_filtered, _last) = (value, value);
            return;
        }

        double fromFilter = value - _filtered, fromLast = value - _last;
        _aboutFilter = _lambda2 * fromFilter * fromFilter + (1 - _lambda2) * _aboutFilter;
        _filtered = _lambda1 * value + (1 - _lambda1) * _filtered;
        _aboutLast = _lambda3 * fromLast * fromLast + (1 - _lambda3) * _aboutLast;
        _last = value;
    }
}
