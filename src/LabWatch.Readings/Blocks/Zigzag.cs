namespace LabWatch.Readings.Blocks;

/// <summary>Signed to unsigned so that small magnitudes stay small: 0, -1, 1, -2 become 0, 1, 2, 3.</summary>
internal static class Zigzag
{
    public static ulong Encode(long value) => unchecked((ulong)((value << 1) ^ (value >> 63)));

    public static long Decode(ulong value) => unchecked((long)(value >> 1) ^ -(long)(value & 1));
}
