using System.IO.Compression;
using System.IO.Hashing;

namespace LabWatch.Readings.Blocks;

/// <summary>Makes the bytes of one sealed block. Not thread-safe; keeps its buffers for the next block.</summary>
internal sealed class BlockEncoder
{
    private readonly ByteWriter _groups = new();
    private readonly ByteWriter _raw = new(BlockFormat.GroupTargetBytes * 2);
    private readonly ByteWriter _directory = new();
    private readonly List<(int Compressed, int Raw)> _groupSizes = [];
    private readonly List<ReadOnlyMemory<long>> _timeColumns = [];

    /// <summary>Encodes series (each sorted, strictly rising, inside the hour, none empty) in the order given.</summary>
    public byte[] Encode(BlockHeader header, IReadOnlyList<ReadingSeries> series)
    {
        _groups.Clear();
        _groupSizes.Clear();
        _timeColumns.Clear();
        List<(int TimeColumn, int Group, int Offset)> places = new(series.Count);
        foreach (ReadingSeries one in series)
        {
            places.Add((TimeColumnOf(one.TimeMicroseconds), 0, 0));
        }

        WriteTimes(header.Hour);
        for (int i = 0; i < series.Count; i++)
        {
            places[i] = places[i] with { Group = _groupSizes.Count, Offset = _raw.Length };
            ValueColumn.Write(_raw, series[i].Values.Span);
            QualityRuns.Write(_raw, series[i].Qualities.Span);
            if (_raw.Length >= BlockFormat.GroupTargetBytes)
            {
                CloseGroup();
            }
        }

        CloseGroup();
        WriteDirectory(header, series, places);
        return Assemble(header, series.Sum(one => one.Count));
    }

    private int TimeColumnOf(ReadOnlyMemory<long> times)
    {
        for (int i = 0; i < _timeColumns.Count; i++)
        {
            if (_timeColumns[i].Span.SequenceEqual(times.Span))
            {
                return i;
            }
        }

        _timeColumns.Add(times);
        return _timeColumns.Count - 1;
    }

    private void WriteTimes(long hour)
    {
        _raw.Clear();
        foreach (ReadOnlyMemory<long> times in _timeColumns)
        {
            TimeColumn.Write(_raw, times.Span, hour);
        }

        CloseGroup();
    }

    private void CloseGroup()
    {
        if (_raw.Length == 0)
        {
            return;
        }

        Span<byte> target = _groups.Take(BrotliEncoder.GetMaxCompressedLength(_raw.Length));
        if (!BrotliEncoder.TryCompress(_raw.Written, target, out int written, BlockFormat.BrotliQuality, BlockFormat.BrotliWindow))
        {
            throw new InvalidOperationException("The compressor needed more than its own stated maximum.");
        }

        _groups.Drop(target.Length - written);
        _groupSizes.Add((written, _raw.Length));
        _raw.Clear();
    }

    private void WriteDirectory(BlockHeader header, IReadOnlyList<ReadingSeries> series, List<(int TimeColumn, int Group, int Offset)> places)
    {
        _directory.Clear();
        _directory.WriteText(header.Source.Site);
        _directory.WriteText(header.Source.Source);
        _directory.WriteVarint(_timeColumns.Count);
        foreach (ReadOnlyMemory<long> times in _timeColumns)
        {
            _directory.WriteVarint(times.Length);
            _directory.WriteVarint((ulong)(times.Span[^1] - header.Hour));
        }

        _directory.WriteVarint(_groupSizes.Count);
        foreach ((int compressed, int raw) in _groupSizes)
        {
            _directory.WriteVarint(compressed);
            _directory.WriteVarint(raw);
        }

        _directory.WriteVarint(series.Count);
        for (int i = 0; i < series.Count; i++)
        {
            _directory.WriteText(series[i].Channel);
            _directory.WriteVarint(places[i].TimeColumn);
            _directory.WriteVarint(places[i].Group);
            _directory.WriteVarint(places[i].Offset);
        }
    }

    private byte[] Assemble(BlockHeader header, int readings)
    {
        ByteWriter block = new(BlockFormat.HeaderBytes + _directory.Length + _groups.Length + BlockFormat.CheckSumBytes);
        block.WriteUInt32(BlockFormat.Magic);
        block.WriteBytes([BlockFormat.Version, 0, 0, 0]);
        block.WriteInt64(header.Hour);
        block.WriteUInt32((uint)header.Part);
        block.WriteUInt32((uint)readings);
        block.WriteBytes(header.PreviousDigest.Span);
        block.WriteUInt32((uint)_directory.Length);
        block.WriteBytes(_directory.Written);
        block.WriteBytes(_groups.Written);
        block.WriteUInt32(Crc32.HashToUInt32(block.Written));
        return block.Buffer;
    }
}
