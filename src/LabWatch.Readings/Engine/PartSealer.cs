using System.Security.Cryptography;
using LabWatch.Readings.Blocks;
using LabWatch.Readings.Head;
using LabWatch.Readings.Summaries;

namespace LabWatch.Readings.Engine;

/// <summary>Turns frozen parts into sealed bytes. Works on memory that no longer changes; not thread-safe.</summary>
internal sealed class PartSealer
{
    private readonly BlockEncoder _encoder = new();

    /// <summary>The bytes that seal a frozen part.</summary>
    /// <param name="hour">The hour.</param>
    /// <param name="part">Its frozen part.</param>
    /// <param name="previousDigest">Digest of the part before; empty for part 0.</param>
    public SealedPart Seal(HeadHour hour, HeadPart part, byte[] previousDigest)
    {
        byte[] previous = previousDigest.Length == BlockFormat.DigestBytes ? previousDigest : new byte[BlockFormat.DigestBytes];
        List<ReadingSeries> series = [];
        for (int channel = 0; channel < part.Columns.Length; channel++)
        {
            if (part.Columns[channel] is { Published: > 0 } column)
            {
                series.Add(column.Snapshot().ToSeries(hour.Source.Channels[channel].Name));
            }
        }

        series.Sort((left, right) => string.CompareOrdinal(left.Channel, right.Channel));
        byte[] block = _encoder.Encode(new BlockHeader(hour.Source.Key, hour.Hour, part.Part, previous), series);
        return new SealedPart(hour, part, block, SHA256.HashData(block), SummaryCodec.Encode(series, hour.Hour));
    }
}
