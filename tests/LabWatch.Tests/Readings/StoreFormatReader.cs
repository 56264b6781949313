using System.IO.Compression;
using System.Text;

namespace LabWatch.Tests.Readings;

/// <summary>Reads a sealed block by its description alone: docs/reference/store-format.md shows this code, and it uses nothing of the program.</summary>
internal static class StoreFormatReader
{
    public static List<(string Channel, long Time, double Value, byte Quality)> Read(byte[] block)
    {
        Cursor head = new(block, 8);
        long hour = head.Int64();
        Cursor directory = new(block, 60);
        (string site, string source) = (directory.Text(), directory.Text());
        int[] counts = directory.List(() => (directory.Count(), directory.Count64()).Item1);
        Cursor body = new(block, 60 + BitConverter.ToInt32(block, 56));
        byte[][] groups = directory.List(() => Unfold(body.Take(directory.Count()), new byte[directory.Count()]));
        Cursor first = new(groups[0], 0);
        long[][] times = [.. counts.Select(count => Times(first, hour, count))];
        List<(string, long, double, byte)> readings = [];
        directory.List(() =>
        {
            string channel = directory.Text();
            long[] time = times[directory.Count()];
            Cursor raw = new(groups[directory.Count()], directory.Count());
            double[] values = raw.Byte() == 0 ? Decimals(raw, time.Length) : ExclusiveOrs(raw, time.Length);
            for (int i = 0; i < time.Length;)
            {
                (byte quality, int end) = (raw.Byte(), i + raw.Count());
                for (; i < end; i++) readings.Add((channel, time[i], values[i], quality));
            }

            return 0;
        });
        return readings;
    }

    private static double[] Decimals(Cursor raw, int count)
    {
        double power = Math.Pow(10, raw.Byte());
        int place = 0;
        (int At, double Value)[] exceptions = raw.List(() => (place += raw.Count(), BitConverter.Int64BitsToDouble(raw.Int64())));
        (int predictor, int width, long origin) = (raw.Byte(), raw.Byte(), raw.Signed());
        byte[] planes = raw.Take(width * count);
        (long before, long beforeThat) = (origin, origin);
        double[] values = new double[count];
        for (int i = 0; i < count; i++)
        {
            ulong rest = 0;
            for (int plane = 0; plane < width; plane++) rest |= (ulong)planes[(plane * count) + i] << (8 * plane);
            long predicted = predictor == 0 ? origin : predictor == 1 ? before : (2 * before) - beforeThat;
            (before, beforeThat) = (predicted + Cursor.Unzigzag(rest), before);
            values[i] = before / power;
        }

        foreach ((int at, double value) in exceptions) values[at] = value;
        return values;
    }

    private static double[] ExclusiveOrs(Cursor raw, int count)
    {
        int mask = raw.Byte();
        ulong[] bits = new ulong[count];
        for (int plane = 0; plane < 8; plane++)
            for (int i = 0; (mask >> plane) % 2 == 1 && i < count; i++) bits[i] |= (ulong)raw.Byte() << (8 * plane);
        for (int i = 1; i < count; i++) bits[i] ^= bits[i - 1];
        return [.. bits.Select(BitConverter.UInt64BitsToDouble)];
    }

    private static long[] Times(Cursor raw, long hour, int count)
    {
        (long unit, long offset, long step) = ((long)Math.Pow(10, raw.Byte()), 0, 0);
        return [.. Enumerable.Range(0, count).Select(_ => hour + (unit * (offset += step += raw.Signed())))];
    }

    private static byte[] Unfold(byte[] compressed, byte[] raw) => BrotliDecoder.TryDecompress(compressed, raw, out _) ? raw : throw new InvalidDataException();

    private sealed class Cursor(byte[] bytes, int at)
    {
        private int _at = at;

        public static long Unzigzag(ulong value) => (long)(value >> 1) ^ -(long)(value & 1);

        public byte Byte() => bytes[_at++];

        public byte[] Take(int count) => bytes.AsSpan((_at += count) - count, count).ToArray();

        public long Int64() => BitConverter.ToInt64(Take(8));

        public ulong Count64() => (bytes[_at] & 0x7FUL) | (Byte() < 0x80 ? 0 : Count64() << 7);

        public int Count() => (int)Count64();

        public long Signed() => Unzigzag(Count64());

        public string Text() => Encoding.UTF8.GetString(Take(Count()));

        public T[] List<T>(Func<T> one) => [.. Enumerable.Range(0, Count()).Select(_ => one())];
    }
}
