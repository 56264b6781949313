using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Engine;

/// <summary>Puts pieces of channels together into one series each, cut to a window and in rising order of time.</summary>
internal sealed class SeriesBuilder(TimeWindow window)
{
    private readonly SortedDictionary<string, List<ReadingSeries>> _pieces = new(StringComparer.Ordinal);

    /// <summary>Adds a piece that is in rising order itself.</summary>
    public void Add(ReadingSeries piece)
    {
        ReadOnlySpan<long> times = piece.TimeMicroseconds.Span;
        int from = LowerBound(times, window.Start.Microseconds);
        int count = LowerBound(times, window.End.Microseconds) - from;
        if (count <= 0)
        {
            return;
        }

        if (!_pieces.TryGetValue(piece.Channel, out List<ReadingSeries>? pieces))
        {
            _pieces.Add(piece.Channel, pieces = []);
        }

        pieces.Add(count == times.Length
            ? piece
            : new ReadingSeries(
                piece.Channel, piece.TimeMicroseconds.Slice(from, count), piece.Values.Slice(from, count), piece.Qualities.Slice(from, count)));
    }

    public IReadOnlyList<ReadingSeries> Build() => [.. _pieces.Select(one => one.Value.Count == 1 ? one.Value[0] : Join(one.Key, one.Value))];

    private static ReadingSeries Join(string channel, List<ReadingSeries> pieces)
    {
        int count = pieces.Sum(piece => piece.Count);
        long[] times = new long[count];
        double[] values = new double[count];
        ReadingQuality[] qualities = new ReadingQuality[count];
        int at = 0;
        bool ordered = true;
        foreach (ReadingSeries piece in pieces)
        {
            ordered &= at == 0 || piece.TimeMicroseconds.Span[0] > times[at - 1];
            piece.TimeMicroseconds.CopyTo(times.AsMemory(at));
            piece.Values.CopyTo(values.AsMemory(at));
            piece.Qualities.CopyTo(qualities.AsMemory(at));
            at += piece.Count;
        }

        return new Head.ColumnSnapshot(times, values, qualities, count, ordered).ToSeries(channel);
    }

    private static int LowerBound(ReadOnlySpan<long> times, long time)
    {
        int at = times.BinarySearch(time);
        return at < 0 ? ~at : at;
    }
}
