using System.Buffers.Binary;
using System.Security.Cryptography;

namespace LabWatch.Metrology.Cavities;

/// <summary>
/// Hit counts as bytes, so that a trace can be kept and travel with what rests on it: eight bytes <c>LWHITS</c> and version, the numbers big-endian, SHA-256 of all before it at the end.
/// What is read back gives the same results bit for bit.
/// </summary>
public static class HitCountsFormat
{
    /// <summary>Version of the format and of the tracers behind it: counts of another version are traced again.</summary>
    public const ushort Version = 1;

    private const int HashLength = 32;
    private const int LargestCount = 1024;
    private static readonly byte[] Mark = "LWHITS"u8.ToArray();

    /// <summary>Writes counts over the default zones of their geometry.</summary>
    public static byte[] Write(HitCounts counts)
    {
        ArgumentNullException.ThrowIfNull(counts);
        double[][] hits = counts.AllHits, escapes = counts.AllEscapes;
        int length = Mark.Length + 2 + 7 * 8 + 8 * (hits.Length * counts.Grid.Zones.Count + escapes.Length * hits.Length * 2) + HashLength;
        byte[] bytes = new byte[length];
        Mark.CopyTo(bytes, 0);
        BinaryPrimitives.WriteUInt16BigEndian(bytes.AsSpan(Mark.Length), Version);
        int at = Mark.Length + 2;
        foreach (long whole in new[] { (long)counts.Method, (long)counts.Second, counts.Depth, escapes.Length, counts.Rays }) Put(bytes, ref at, whole);
        Put(bytes, ref at, BitConverter.DoubleToInt64Bits(counts.DiffuseFraction));
        Put(bytes, ref at, BitConverter.DoubleToInt64Bits(counts.RelativeError));
        foreach (double[] row in hits.Concat(escapes))
        {
            foreach (double value in row) Put(bytes, ref at, BitConverter.DoubleToInt64Bits(value));
        }

        SHA256.HashData(bytes.AsSpan(0, at), bytes.AsSpan(at));
        return bytes;
    }

    /// <summary>Reads counts back; null where the bytes are damaged, of another version, or of a geometry with other zones.</summary>
    /// <param name="bytes">What <see cref="Write"/> gave.</param>
    /// <param name="geometry">The geometry that was traced.</param>
    public static HitCounts? Read(ReadOnlySpan<byte> bytes, CavityGeometry geometry)
    {
        int at = Mark.Length + 2;
        if (bytes.Length < at + 7 * 8 + HashLength || !bytes.StartsWith(Mark) || BinaryPrimitives.ReadUInt16BigEndian(bytes[Mark.Length..]) != Version) return null;
        ReadOnlySpan<byte> content = bytes[..^HashLength];
        if (!SHA256.HashData(content).AsSpan().SequenceEqual(bytes[^HashLength..])) return null;
        long method = Take(content, ref at), second = Take(content, ref at), depth = Take(content, ref at), replicates = Take(content, ref at), rays = Take(content, ref at);
        double diffuse = BitConverter.Int64BitsToDouble(Take(content, ref at)), error = BitConverter.Int64BitsToDouble(Take(content, ref at));
        if (depth is < 1 or > LargestCount || replicates is < 1 or > LargestCount || !Enum.IsDefined((CavityMethod)method) || second is < 0 or > 3) return null;
        ZoneGrid grid = ZoneGrid.Nodes(geometry);
        HitOrder[] orders = HitTally.OrdersOf((SecondMaterial)second, (int)depth);
        if (content.Length - at != 8L * (orders.Length * (long)grid.Zones.Count + replicates * orders.Length * 2)) return null;
        double[][] hits = Rows(content, ref at, orders.Length, grid.Zones.Count), escapes = Rows(content, ref at, (int)replicates, orders.Length * 2);
        return new HitCounts(grid, (CavityMethod)method, diffuse, error, rays, (SecondMaterial)second, orders, hits, escapes);
    }

    private static double[][] Rows(ReadOnlySpan<byte> content, ref int at, int rows, int columns)
    {
        double[][] values = new double[rows][];
        for (int r = 0; r < rows; r++)
        {
            values[r] = new double[columns];
            for (int c = 0; c < columns; c++) values[r][c] = BitConverter.Int64BitsToDouble(Take(content, ref at));
        }

        return values;
    }

    private static void Put(byte[] bytes, ref int at, long value)
    {
        BinaryPrimitives.WriteInt64BigEndian(bytes.AsSpan(at), value);
        at += 8;
    }

    private static long Take(ReadOnlySpan<byte> bytes, ref int at)
    {
        long value = BinaryPrimitives.ReadInt64BigEndian(bytes[at..]);
        at += 8;
        return value;
    }
}
