using System.Globalization;

namespace LabWatch.Intake.Units;

/// <summary>
/// From the unit of a device to the unit of a channel: value times numerator over denominator, plus an offset. Done in decimal arithmetic
/// (28 digits) where the value fits, so that 300.15 K is 27 Cel and not 26.999999999999943; the same input always gives the same double.
/// </summary>
/// <param name="Numerator">Factor.</param>
/// <param name="Denominator">Divisor; not zero.</param>
/// <param name="Offset">Added last, in the channel's unit.</param>
internal sealed record UnitConversion(decimal Numerator, decimal Denominator, decimal Offset)
{
    private const double LargestDecimal = 1e12;
    private const double SmallestDecimal = 1e-9;

    /// <summary>The value in the channel's unit; NaN stays NaN.</summary>
    public double Convert(double value)
    {
        double magnitude = Math.Abs(value);
        if (magnitude is 0 or (>= SmallestDecimal and < LargestDecimal)
            && decimal.TryParse(value.ToString("R", CultureInfo.InvariantCulture), NumberStyles.Float, CultureInfo.InvariantCulture, out decimal exact))
        {
            // By way of text: the cast from decimal to double is not rounded correctly in its last digit.
            return double.Parse(((exact * Numerator / Denominator) + Offset).ToString(CultureInfo.InvariantCulture), NumberStyles.Float, CultureInfo.InvariantCulture);
        }

        return (value * (double)Numerator / (double)Denominator) + (double)Offset;
    }
}
