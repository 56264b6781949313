using LabWatch.Readings.Blocks;

namespace LabWatch.Readings.Head;

/// <summary>The sealed parts of one hour, opened to look up what is stored under an identity. A channel is unfolded when it is first needed.</summary>
internal sealed class SealedIdentity(IReadOnlyList<(long Id, SealedBlock Block)> blocks, Action<long, DamagedDataException> onDamaged)
{
    private readonly Dictionary<string, List<ReadingSeries>> _series = new(StringComparer.Ordinal);

    /// <summary>Latest sealed time of a channel; <see cref="long.MinValue"/> where it has none.</summary>
    public long Last(string channel)
    {
        long last = long.MinValue;
        foreach ((_, SealedBlock block) in blocks)
        {
            int at = block.Find(channel);
            last = at < 0 ? last : Math.Max(last, block.LastTime(at));
        }

        return last;
    }

    /// <summary>The value stored for an identity; damaged blocks are reported and passed over.</summary>
    public bool TryFind(string channel, long time, out double value)
    {
        foreach (ReadingSeries series in Series(channel))
        {
            int at = series.TimeMicroseconds.Span.BinarySearch(time);
            if (at >= 0)
            {
                value = series.Values.Span[at];
                return true;
            }
        }

        value = 0;
        return false;
    }

    private List<ReadingSeries> Series(string channel)
    {
        if (!_series.TryGetValue(channel, out List<ReadingSeries>? found))
        {
            found = [];
            foreach ((long id, SealedBlock block) in blocks)
            {
                Unfold(id, block, channel, found);
            }

            _series.Add(channel, found);
        }

        return found;
    }

    private void Unfold(long id, SealedBlock block, string channel, List<ReadingSeries> found)
    {
        try
        {
            int at = block.Find(channel);
            if (at >= 0)
            {
                found.Add(block.Decode(at));
            }
        }
        catch (DamagedDataException damage)
        {
            onDamaged(id, damage);
        }
    }
}
