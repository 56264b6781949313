using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Statistics;
using LabWatch.Readings;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>Examines the readings of one channel in one window; those of the lead-in show what is usual for it.</summary>
internal static class ChannelExamination
{
    /// <summary>Neighbours on each side that a spike is compared with.</summary>
    private const int SpikeNeighbours = 5;

    /// <summary>
    /// Standard deviations that make a spike: 8 where 3 is the custom, because a thermometer in a stirred or drawn fluid moves more than its white noise,
    /// and a disturbance on a line is larger still.
    /// </summary>
    private const double SpikeDeviations = 8;

    /// <summary>Examines a channel.</summary>
    /// <param name="channel">The channel.</param>
    /// <param name="series">Its readings over lead-in and window; null where there are none.</param>
    /// <param name="window">The window.</param>
    /// <param name="peerRange">Largest range of the values of another well in the same unit; zero where there is none.</param>
    public static ChannelHealth Examine(Channel channel, ReadingSeries? series, TimeWindow window, double peerRange)
    {
        ReadOnlySpan<long> times = series is null ? [] : series.TimeMicroseconds.Span;
        int first = times.BinarySearch(window.Start.Microseconds) is var found && found < 0 ? ~found : found;
        ReadingGaps gaps = ReadingGaps.Of(times, first, window, channel.Interval);
        int expected = (int)Math.Max(1, window.Duration / channel.Interval);
        ChannelHealth health = new(channel, expected, times.Length - first, Math.Min(expected, gaps.Missing)) { LongestGap = gaps.Longest, GapFrom = gaps.From };
        return health.Received == 0 ? health : Judge(health, series!, first, peerRange);
    }

    private static ChannelHealth Judge(ChannelHealth health, ReadingSeries series, int first, double peerRange)
    {
        bool[] bad = new bool[series.Count];
        health = Flags(health, series, first, bad);
        int[] places = new int[series.Count];
        double[] values = new double[series.Count];
        long[] times = new long[series.Count];
        int usable = Usable(series, bad, places, values, times);
        health = Stuck(health, first, bad, places.AsSpan(0, usable), times.AsSpan(0, usable), values.AsSpan(0, usable), peerRange);
        health = Spikes(health, first, bad, places.AsSpan(0, usable), values.AsSpan(0, usable));
        return health with { Bad = bad.AsSpan(first).Count(true) };
    }

    private static ChannelHealth Flags(ChannelHealth health, ReadingSeries series, int first, bool[] bad)
    {
        ReadOnlySpan<ReadingQuality> qualities = series.Qualities.Span;
        bool mayShow = ChannelTraits.MayShowOutOfRange(health.Channel);
        int noValue = 0, outside = 0, future = 0, late = 0, stamped = 0, stepped = 0;
        for (int i = 0; i < qualities.Length; i++)
        {
            ReadingQuality quality = qualities[i];
            bool isOutside = (quality & ReadingQuality.OutsideSensorRange) != 0;
            bad[i] = (quality & (ReadingQuality.NoValue | ReadingQuality.FromTheFuture)) != 0 || (isOutside && !mayShow);
            if (i >= first)
            {
                noValue += (quality & ReadingQuality.NoValue) != 0 ? 1 : 0;
                outside += isOutside ? 1 : 0;
                future += (quality & ReadingQuality.FromTheFuture) != 0 ? 1 : 0;
                late += (quality & ReadingQuality.Late) != 0 ? 1 : 0;
                stamped += (quality & ReadingQuality.StampedOnArrival) != 0 ? 1 : 0;
                stepped += (quality & ReadingQuality.ClockStepped) != 0 ? 1 : 0;
            }
        }

        return health with
        {
            NoValue = noValue,
            OutsideRange = outside,
            FromTheFuture = future,
            Late = late,
            StampedOnArrival = stamped,
            ClockStepped = stepped,
        };
    }

    private static int Usable(ReadingSeries series, bool[] bad, int[] places, double[] values, long[] times)
    {
        int usable = 0;
        for (int i = 0; i < bad.Length; i++)
        {
            double value = series.Values.Span[i];
            if (!bad[i] && double.IsFinite(value) && (series.Qualities.Span[i] & ReadingQuality.OutsideSensorRange) == 0)
            {
                (places[usable], values[usable], times[usable]) = (i, value, series.TimeMicroseconds.Span[i]);
                usable++;
            }
        }

        return usable;
    }

    private static ChannelHealth Stuck(
        ChannelHealth health, int first, bool[] bad, ReadOnlySpan<int> places, ReadOnlySpan<long> times, ReadOnlySpan<double> values, double peerRange)
    {
        if (ChannelTraits.IsSetOrSwitched(health.Channel) || StuckValue.Find(health.Channel, times, values, peerRange) is not { } run)
        {
            return health;
        }

        if (!run.IsStuck)
        {
            return health with { IsConstant = true };
        }

        int stuck = 0;
        foreach (int place in places[run.From..run.Until])
        {
            bad[place] = true;
            stuck += place >= first ? 1 : 0;
        }

        return stuck == 0
            ? health
            : health with { Stuck = stuck, StuckAt = values[run.From], StuckFor = TimeSpan.FromMicroseconds(times[run.Until - 1] - times[run.From]) };
    }

    private static ChannelHealth Spikes(ChannelHealth health, int first, bool[] bad, ReadOnlySpan<int> places, ReadOnlySpan<double> values)
    {
        if (ChannelTraits.IsSetOrSwitched(health.Channel))
        {
            return health;
        }

        double noise = ReadingNoise.Deviation(values, 0, 0);
        double least = Math.Max(ReadingNoise.SmallestStep(values), double.IsNaN(noise) ? 0 : noise);
        bool[] marks = new bool[values.Length];
        if (least <= 0 || HampelFilter.Find(values, SpikeNeighbours, SpikeDeviations, least, marks) == 0)
        {
            return health;
        }

        int spikes = 0;
        for (int i = 0; i < marks.Length; i++)
        {
            if (marks[i])
            {
                spikes += places[i] >= first && !bad[places[i]] ? 1 : 0;
                bad[places[i]] = true;
            }
        }

        return health with { Spikes = spikes };
    }
}
