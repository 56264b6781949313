namespace LabWatch.Intake.Payloads;

/// <summary>
/// Seconds as a decimal fraction, exact to 18 decimals: whole microseconds (rounded towards negative infinity) and the rest in attoseconds.
/// A time on the wire never passes through a double, so that the same text always gives the same microsecond and a sum of base and
/// relative time is truncated once.
/// </summary>
/// <param name="Microseconds">Whole microseconds, rounded towards negative infinity.</param>
/// <param name="Attoseconds">What is left, 0 to 999999999999.</param>
internal readonly record struct DecimalSeconds(long Microseconds, long Attoseconds)
{
    /// <summary>Values of this many seconds or more, or their negatives, are refused.</summary>
    public const int MaximumMagnitude = 12;

    private const int MicrosecondDigits = 6;
    private const int KeptDecimals = 18;
    private const long AttosecondsPerMicrosecond = 1_000_000_000_000;
    private const int ExponentLimit = 10_000;

    private static readonly long[] Powers =
    [
        1, 10, 100, 1_000, 10_000, 100_000, 1_000_000, 10_000_000, 100_000_000, 1_000_000_000, 10_000_000_000, 100_000_000_000,
        1_000_000_000_000, 10_000_000_000_000, 100_000_000_000_000, 1_000_000_000_000_000, 10_000_000_000_000_000, 100_000_000_000_000_000,
    ];

    /// <summary>The exact sum.</summary>
    public static DecimalSeconds operator +(DecimalSeconds left, DecimalSeconds right)
    {
        long rest = left.Attoseconds + right.Attoseconds;
        long carry = rest >= AttosecondsPerMicrosecond ? 1 : 0;
        return new(left.Microseconds + right.Microseconds + carry, rest - (carry * AttosecondsPerMicrosecond));
    }

    /// <summary>Reads a number in the grammar of JSON (RFC 8259 section 6), which the caller has checked; false where it is out of range.</summary>
    public static bool TryParse(ReadOnlySpan<byte> number, out DecimalSeconds seconds)
    {
        bool negative = number.Length > 0 && number[0] == (byte)'-';
        ReadOnlySpan<byte> rest = negative ? number[1..] : number;
        int mantissaLength = rest.IndexOfAny((byte)'e', (byte)'E');
        int exponent = mantissaLength < 0 ? 0 : ParseExponent(rest[(mantissaLength + 1)..]);
        ReadOnlySpan<byte> mantissa = mantissaLength < 0 ? rest : rest[..mantissaLength];
        seconds = default;
        if (!TryAccumulate(mantissa, exponent, out long microseconds, out long attoseconds))
        {
            return false;
        }

        seconds = !negative ? new(microseconds, attoseconds)
            : attoseconds == 0 ? new(-microseconds, 0)
            : new(-microseconds - 1, AttosecondsPerMicrosecond - attoseconds);
        return true;
    }

    private static int ParseExponent(ReadOnlySpan<byte> text)
    {
        bool negative = text.Length > 0 && text[0] == (byte)'-';
        int exponent = 0;
        foreach (byte character in text)
        {
            if (character is >= (byte)'0' and <= (byte)'9')
            {
                exponent = Math.Min(ExponentLimit, (exponent * 10) + (character - '0'));
            }
        }

        return negative ? -exponent : exponent;
    }

    private static bool TryAccumulate(ReadOnlySpan<byte> mantissa, int exponent, out long microseconds, out long attoseconds)
    {
        microseconds = attoseconds = 0;
        int point = mantissa.IndexOf((byte)'.');
        int weight = (point < 0 ? mantissa.Length : point) - 1 + exponent;
        foreach (byte character in mantissa)
        {
            if (character == (byte)'.')
            {
                continue;
            }

            int digit = character - '0';
            if (digit != 0 && weight >= MaximumMagnitude)
            {
                return false;
            }

            if (weight >= -MicrosecondDigits && weight < MaximumMagnitude)
            {
                microseconds += digit * PowerOfTen(weight + MicrosecondDigits);
            }
            else if (weight >= -KeptDecimals && weight < -MicrosecondDigits)
            {
                attoseconds += digit * PowerOfTen(weight + KeptDecimals);
            }

            weight--;
        }

        return true;
    }

    private static long PowerOfTen(int power) => Powers[power];
}
