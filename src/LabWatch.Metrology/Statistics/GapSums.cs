using System.Buffers;

namespace LabWatch.Metrology.Statistics;

/// <summary>Running sums and counts of values with gaps, from which the mean of any interval follows at once. Pooled buffers.</summary>
internal ref struct GapSums : IDisposable
{
    private readonly int _length;
    private readonly bool _complete;
    private double[] _sums;
    private int[] _counts;
    private double[] _work;
    private int[] _workCounts;

    public GapSums(ReadOnlySpan<double> values)
    {
        _length = values.Length;
        _sums = ArrayPool<double>.Shared.Rent(_length + 1);
        _counts = ArrayPool<int>.Shared.Rent(_length + 1);
        _work = ArrayPool<double>.Shared.Rent(_length + 1);
        _workCounts = ArrayPool<int>.Shared.Rent(_length + 1);
        // About the mean, so that the running sums stay small and keep their digits.
        double mean = Summary.Of(values).Mean;
        CompensatedSum sum = default;
        (_sums[0], _counts[0]) = (0, 0);
        for (int i = 0; i < _length; i++)
        {
            bool there = double.IsFinite(values[i]);
            if (there) sum.Add(values[i] - mean);
            _sums[i + 1] = sum.Value;
            _counts[i + 1] = _counts[i] + (there ? 1 : 0);
        }

        _complete = _counts[_length] == _length;
    }

    public readonly AllanPoint Deviation(int m, bool modified, int step)
    {
        int starts = _length - 2 * m + 1;
        if (starts < 1) return new AllanPoint(m, double.NaN, 0, double.NaN);
        (double squares, int count) = modified ? Modified(m, starts) : Plain(m, starts, step);
        return new AllanPoint(m, count > 0 ? Math.Sqrt(squares / (2.0 * count)) : double.NaN, count, EquivalentDegreesOfFreedom(m));
    }

    private readonly (double Squares, int Count) Plain(int m, int starts, int step)
    {
        double squares = 0, scale = 1.0 / m;
        int count = 0;
        for (int k = 0; k < starts; k += step)
        {
            double difference = _complete ? (_sums[k + 2 * m] - 2 * _sums[k + m] + _sums[k]) * scale : Difference(k, m);
            if (double.IsNaN(difference)) continue;
            squares += difference * difference;
            count++;
        }

        return (squares, count);
    }

    private readonly (double Squares, int Count) Modified(int m, int starts)
    {
        // Running sums of the differences of neighbouring means, then means of m of them.
        double sum = 0, scale = 1.0 / m;
        int there = 0;
        (_work[0], _workCounts[0]) = (0, 0);
        for (int k = 0; k < starts; k++)
        {
            double difference = _complete ? (_sums[k + 2 * m] - 2 * _sums[k + m] + _sums[k]) * scale : Difference(k, m);
            if (!double.IsNaN(difference))
            {
                sum += difference;
                there++;
            }

            _work[k + 1] = sum;
            _workCounts[k + 1] = there;
        }

        double squares = 0;
        int count = 0;
        for (int k = 0; k + m <= starts; k++)
        {
            int used = _workCounts[k + m] - _workCounts[k];
            if (used < AllanDeviation.LeastPart * m) continue;
            double mean = (_work[k + m] - _work[k]) / used;
            squares += mean * mean;
            count++;
        }

        return (squares, count);
    }

    private readonly double Difference(int k, int m)
    {
        int first = _counts[k + m] - _counts[k], second = _counts[k + 2 * m] - _counts[k + m];
        if (first < AllanDeviation.LeastPart * m || second < AllanDeviation.LeastPart * m) return double.NaN;
        return (_sums[k + 2 * m] - _sums[k + m]) / second - (_sums[k + m] - _sums[k]) / first;
    }

    private readonly double EquivalentDegreesOfFreedom(int m)
    {
        double n = _counts[_length] + 1;
        return Math.Max(1, (3 * (n - 1) / (2 * m) - 2 * (n - 2) / n) * (4.0 * m * m / (4.0 * m * m + 5)));
    }

    public void Dispose()
    {
        ArrayPool<double>.Shared.Return(_sums);
        ArrayPool<int>.Shared.Return(_counts);
        ArrayPool<double>.Shared.Return(_work);
        ArrayPool<int>.Shared.Return(_workCounts);
        (_sums, _counts, _work, _workCounts) = ([], [], [], []);
    }
}
