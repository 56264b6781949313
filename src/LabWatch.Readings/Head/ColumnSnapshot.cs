using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Head;

/// <summary>The published readings of a column at one moment; the arrays may be longer and never change below the count.</summary>
internal readonly record struct ColumnSnapshot(long[] Times, double[] Values, ReadingQuality[] Qualities, int Count, bool Ordered)
{
    /// <summary>The readings in rising order of time: the arrays themselves where they are in order, else sorted copies.</summary>
    public ReadingSeries ToSeries(string channel)
    {
        if (Ordered)
        {
            return new ReadingSeries(channel, Times.AsMemory(0, Count), Values.AsMemory(0, Count), Qualities.AsMemory(0, Count));
        }

        long[] times = Times.AsSpan(0, Count).ToArray();
        int[] order = new int[Count];
        for (int i = 0; i < order.Length; i++)
        {
            order[i] = i;
        }

        Array.Sort(times, order);
        double[] values = new double[Count];
        ReadingQuality[] qualities = new ReadingQuality[Count];
        for (int i = 0; i < order.Length; i++)
        {
            values[i] = Values[order[i]];
            qualities[i] = Qualities[order[i]];
        }

        return new ReadingSeries(channel, times, values, qualities);
    }
}
