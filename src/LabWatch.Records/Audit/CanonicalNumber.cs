using System.Globalization;

namespace LabWatch.Records.Audit;

/// <summary>Writes a double as ECMAScript's Number::toString does (ECMA-262, 6.1.6.1.20), which RFC 8785 section 3.2.2.3 asks for.</summary>
internal static class CanonicalNumber
{
    /// <summary>The shortest text that gives the same double back, in ECMAScript's choice of plain and exponential form.</summary>
    /// <exception cref="ArgumentException">The number is not finite.</exception>
    public static string Write(double number)
    {
        if (!double.IsFinite(number))
        {
            throw new ArgumentException("A number that is not finite has no canonical form.", nameof(number));
        }

        if (number == 0)
        {
            return "0";
        }

        (string digits, int point) = Decompose(Math.Abs(number));
        return (number < 0 ? "-" : string.Empty) + Layout(digits, point);
    }

    /// <summary>The shortest digits d1 d2 ... and the place of the point: the number is 0.d1d2... times ten to that place.</summary>
    private static (string Digits, int Point) Decompose(double number)
    {
        string shortest = number.ToString("R", CultureInfo.InvariantCulture);
        int cut = shortest.IndexOf('E', StringComparison.Ordinal);
        string mantissa = cut < 0 ? shortest : shortest[..cut];
        int exponent = cut < 0 ? 0 : int.Parse(shortest.AsSpan(cut + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
        int dot = mantissa.IndexOf('.', StringComparison.Ordinal);
        int whole = dot < 0 ? mantissa.Length : dot;
        string all = dot < 0 ? mantissa : mantissa.Remove(dot, 1);
        int leadingZeros = all.Length - all.TrimStart('0').Length;
        return (all.Trim('0'), whole + exponent - leadingZeros);
    }

    private static string Layout(string digits, int point)
    {
        if (digits.Length <= point && point <= 21)
        {
            return digits + new string('0', point - digits.Length);
        }

        if (point is > 0 and <= 21)
        {
            return digits[..point] + "." + digits[point..];
        }

        if (point is > -6 and <= 0)
        {
            return "0." + new string('0', -point) + digits;
        }

        string exponent = (point - 1 < 0 ? "e-" : "e+") + Math.Abs(point - 1).ToString(CultureInfo.InvariantCulture);
        return digits.Length == 1 ? digits + exponent : digits[..1] + "." + digits[1..] + exponent;
    }
}
