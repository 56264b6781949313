using System.Globalization;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>A value that is repeated for longer than noise and resolution allow.</summary>
/// <param name="From">Index of the first repetition.</param>
/// <param name="Until">Index after the last.</param>
/// <param name="IsStuck">Whether that is known; else the value is constant throughout, and nothing tells whether it can be.</param>
internal readonly record struct StuckValue(int From, int Until, bool IsStuck)
{
    /// <summary>Fewer repetitions than this are no matter.</summary>
    private const int LeastReadings = 30;

    /// <summary>How many of its own last digits the other wells must have moved by while one stood still.</summary>
    private const double PeerDigits = 10;

    private static readonly long LeastMicroseconds = TimeSpan.FromMinutes(5).Ticks / TimeSpan.TicksPerMicrosecond;
    private static readonly long LeastAlone = TimeSpan.FromHours(1).Ticks / TimeSpan.TicksPerMicrosecond;

    /// <summary>
    /// The longest stretch of one value, where it is too long; null where none is. It is too long where it has at least 30 readings in at
    /// least 5 min and
    /// <list type="bullet">
    /// <item>the readings around it show noise of at least one step of the resolution: 30 equal ones in a row then have a probability below
    /// 1e-15; or</item>
    /// <item>there are too few others to compare with, it lasts an hour or more, and the last digit is so fine that any noise moves it, or another
    /// well in the same unit has moved by ten of its digits meanwhile.</item>
    /// </list>
    /// A value at which the channel rests is never stuck, and where the noise is hidden by the resolution nothing is said.
    /// </summary>
    /// <param name="channel">The channel.</param>
    /// <param name="times">Device times of the usable readings, microseconds.</param>
    /// <param name="values">Their values.</param>
    /// <param name="peerRange">Largest range of the values of another well in the same unit; zero where there is none.</param>
    public static StuckValue? Find(Channel channel, ReadOnlySpan<long> times, ReadOnlySpan<double> values, double peerRange)
    {
        (int from, int until) = LongestRun(values);
        if (until - from < LeastReadings || times[until - 1] - times[from] < LeastMicroseconds || ChannelTraits.IsResting(channel, values[from]))
        {
            return null;
        }

        double noise = ReadingNoise.Deviation(values, from, until);
        if (!double.IsNaN(noise))
        {
            return noise > 0 && noise >= ReadingNoise.SmallestStep(values) ? new(from, until, true) : null;
        }

        double digit = LastDigit(values[from]);
        bool moves = times[until - 1] - times[from] >= LeastAlone && (digit <= ChannelTraits.DigitThatMoves(channel) || peerRange >= PeerDigits * digit);
        return moves || until - from == values.Length ? new(from, until, moves) : null;
    }

    /// <summary>The last decimal place of a value as it would be written: 0.01 for 23.45; 1 for whole numbers.</summary>
    internal static double LastDigit(double value)
    {
        string text = value.ToString("R", CultureInfo.InvariantCulture);
        int exponentAt = text.IndexOf('E', StringComparison.Ordinal);
        int exponent = exponentAt < 0 ? 0 : int.Parse(text.AsSpan(exponentAt + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        ReadOnlySpan<char> mantissa = exponentAt < 0 ? text : text.AsSpan(0, exponentAt);
        int point = mantissa.IndexOf('.');
        int decimals = point < 0 ? 0 : mantissa.Length - point - 1;
        return Math.Pow(10, exponent - decimals);
    }

    private static (int From, int Until) LongestRun(ReadOnlySpan<double> values)
    {
        int from = 0, until = 0, start = 0;
        for (int i = 1; i <= values.Length; i++)
        {
            if (i == values.Length || values[i] != values[start])
            {
                (from, until) = i - start > until - from ? (start, i) : (from, until);
                start = i;
            }
        }

        return (from, until);
    }
}
