namespace LabWatch.Readings.Blocks;

/// <summary>Constants of the sealed block. The layout is described byte by byte in docs/reference/store-format.md.</summary>
internal static class BlockFormat
{
    /// <summary>"LWSH" read as a little-endian number.</summary>
    public const uint Magic = 0x4853574C;

    public const byte Version = 1;

    /// <summary>Magic, version, three reserved bytes, hour, part, count of readings, digest of the part before, length of the directory.</summary>
    public const int HeaderBytes = 4 + 4 + 8 + 4 + 4 + DigestBytes + 4;

    public const int DigestBytes = 32;

    public const int CheckSumBytes = 4;

    /// <summary>Channels share a compressed group until it holds this much: small enough to read one channel quickly, large enough to compress.</summary>
    public const int GroupTargetBytes = 24 * 1024;

    /// <summary>Most bytes that a group may unfold to; more is damage.</summary>
    public const int MaximumGroupBytes = 1 << 28;

    public const int MaximumReadings = 1 << 24;

    /// <summary>Hours further from 1970 than this (about 73,000 years) are damage; sums of times inside them cannot overflow.</summary>
    public const long MaximumHour = 1L << 61;

    public const int MaximumChannels = 1 << 16;

    public const int MaximumTextBytes = 256;

    /// <summary>Quality 4 was smaller than the alternatives at their speed; 9 is fifty times slower for a few per cent.</summary>
    public const int BrotliQuality = 4;

    public const int BrotliWindow = 22;
}
