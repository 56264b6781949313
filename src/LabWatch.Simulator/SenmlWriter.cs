using System.Buffers.Text;
using System.Globalization;
using System.Text;
using LabWatch.Lab.Time;
using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator;

/// <summary>Writes packs in SenML JSON (RFC 8428): the base time in the first record, one record a channel, values with the decimals of the readout.</summary>
internal sealed class SenmlWriter
{
    private const int LongestNumber = 24;

    private readonly byte[][][] _heads;
    private readonly int[][] _decimals;
    private readonly byte[] _buffer;

    /// <summary>A writer for some sources, in their order.</summary>
    public SenmlWriter(IReadOnlyList<SourceDesign> designs)
    {
        _heads = [.. designs.Select(design => design.Channels.Select(Head).ToArray())];
        _decimals = [.. designs.Select(design => design.Channels.Select(channel => channel.Decimals).ToArray())];
        _buffer = new byte[64 + _heads.Max(heads => heads.Sum(head => head.Length + LongestNumber + 2))];
    }

    /// <summary>One pack: values in units of the last decimal, null where a channel is silent; <c>[]</c> where all are.</summary>
    public byte[] Write(int source, Instant time, ReadOnlySpan<long?> values)
    {
        int at = 0;
        _buffer[at++] = (byte)'[';
        for (int i = 0; i < _heads[source].Length; i++)
        {
            if (values[i] is { } scaled)
            {
                bool isFirst = at == 1;
                Put(isFirst ? "{"u8 : ",{"u8, ref at);
                if (isFirst)
                {
                    Put("\"bt\":"u8, ref at);
                    PutDecimal(time.Microseconds, 6, ref at);
                    _buffer[at++] = (byte)',';
                }

                Put(_heads[source][i], ref at);
                PutDecimal(scaled, _decimals[source][i], ref at);
                _buffer[at++] = (byte)'}';
            }
        }

        _buffer[at++] = (byte)']';
        return _buffer.AsSpan(0, at).ToArray();
    }

    private static byte[] Head(ChannelDesign channel) =>
        Encoding.UTF8.GetBytes(string.Create(CultureInfo.InvariantCulture, $"\"n\":\"{channel.Id}\",\"u\":\"{channel.Unit}\",\"v\":"));

    private void Put(ReadOnlySpan<byte> text, ref int at)
    {
        text.CopyTo(_buffer.AsSpan(at));
        at += text.Length;
    }

    // An integer with its decimal point moved, trailing zeros of the fraction left out.
    private void PutDecimal(long scaled, int decimals, ref int at)
    {
        while (decimals > 0 && scaled % 10 == 0)
        {
            scaled /= 10;
            decimals--;
        }

        if (scaled < 0)
        {
            _buffer[at++] = (byte)'-';
        }

        Span<byte> digits = stackalloc byte[LongestNumber];
        Utf8Formatter.TryFormat(Math.Abs(scaled), digits, out int length);
        int whole = length - decimals;
        if (whole <= 0)
        {
            Put("0."u8, ref at);
            _buffer.AsSpan(at, -whole).Fill((byte)'0');
            at -= whole;
            Put(digits[..length], ref at);
            return;
        }

        Put(digits[..whole], ref at);
        if (decimals > 0)
        {
            _buffer[at++] = (byte)'.';
            Put(digits[whole..length], ref at);
        }
    }
}
