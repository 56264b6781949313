using System.IO.Compression;

namespace LabWatch.Readings.Blocks;

/// <summary>The compressed groups of a block, each unfolded once when it is first asked for. Group 0 holds the time columns.</summary>
internal sealed class BlockGroups
{
    private readonly ReadOnlyMemory<byte>[] _compressed;
    private readonly int[] _rawLengths;
    private readonly byte[]?[] _raw;

    private BlockGroups(ReadOnlyMemory<byte>[] compressed, int[] rawLengths)
    {
        _compressed = compressed;
        _rawLengths = rawLengths;
        _raw = new byte[compressed.Length][];
    }

    public int Count => _compressed.Length;

    public static BlockGroups Read(ref ByteReader directory, ReadOnlyMemory<byte> bytes)
    {
        int count = directory.ReadCount(Math.Min(BlockFormat.MaximumChannels + 1, directory.Remaining));
        ReadOnlyMemory<byte>[] compressed = new ReadOnlyMemory<byte>[count];
        int[] rawLengths = new int[count];
        int position = 0;
        long raw = 0;
        for (int i = 0; i < count; i++)
        {
            int length = directory.ReadCount(bytes.Length - position);
            rawLengths[i] = directory.ReadCount(BlockFormat.MaximumGroupBytes);
            raw += rawLengths[i];
            compressed[i] = bytes.Slice(position, length);
            position += length;
        }

        return position == bytes.Length && count > 0 && raw <= BlockFormat.MaximumGroupBytes
            ? new BlockGroups(compressed, rawLengths)
            : throw new DamagedDataException("The groups do not fill the block.");
    }

    public int RawLength(int group) => _rawLengths[group];

    public ReadOnlySpan<byte> Raw(int group)
    {
        if (_raw[group] is { } known)
        {
            return known;
        }

        byte[] raw = new byte[_rawLengths[group]];
        if (!BrotliDecoder.TryDecompress(_compressed[group].Span, raw, out int written) || written != raw.Length)
        {
            throw new DamagedDataException("A group does not unfold.");
        }

        _raw[group] = raw;
        return raw;
    }
}
