using LabWatch.Readings;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Summaries;

namespace LabWatch.Evidence.Verification;

/// <summary>Opens a sealed part down to its last reading.</summary>
internal static class BlockExaminer
{
    /// <summary>The header and the readings of a part; the reason where it does not decode.</summary>
    public static (SealedBlock? Block, List<ReadingSeries> Series, string? Reason) Decode(byte[] data)
    {
        try
        {
            SealedBlock block = SealedBlock.Open(data);
            List<ReadingSeries> series = [.. Enumerable.Range(0, block.Channels.Count).Select(block.Decode)];
            return (block, series, null);
        }
        catch (DamagedDataException exception)
        {
            return (null, [], exception.Message);
        }
    }

    /// <summary>Why a summary does not follow from the readings of its part; null where it does.</summary>
    public static string? CompareSummary(byte[] summary, IReadOnlyList<ReadingSeries> series, long hour)
    {
        try
        {
            SealedSummary stored = SummaryCodec.Decode(summary, hour);
            if (!stored.Channels.Select(channel => channel.Channel).SequenceEqual(series.Select(one => one.Channel), StringComparer.Ordinal))
            {
                return "It has other channels than the readings.";
            }

            for (int i = 0; i < series.Count; i++)
            {
                List<ReadingSummary> expected = SummaryFold.Fold(series[i].TimeMicroseconds.Span, series[i].Values.Span, stored.StepMicroseconds);
                if (!Enumerable.SequenceEqual(stored.Channels[i].Rows, expected, SummaryRows.Comparer))
                {
                    return $"The rows of channel {series[i].Channel} are not those of its readings.";
                }
            }

            return null;
        }
        catch (DamagedDataException exception)
        {
            return exception.Message;
        }
    }
}
