using System.Globalization;

namespace LabWatch.Assessments.Evaluation;

/// <summary>
/// Numbers as a person expects them: an uncertainty with two significant digits, a value to the same decimal place (JCGM 100:2008, 7.2.6),
/// always with the decimal point.
/// </summary>
public static class Quantities
{
    private const int MostDecimals = 9;

    /// <summary>A number with a given number of significant digits, at least one.</summary>
    public static string Significant(double value, int digits = 2) => Fixed(value, Decimals(value, digits));

    /// <summary>A value rounded to the place of its expanded uncertainty; three significant digits where that is zero or unknown.</summary>
    public static string Value(double value, double expandedUncertainty) =>
        expandedUncertainty > 0 ? Fixed(value, Decimals(expandedUncertainty, 2)) : Significant(value, 3);

    /// <summary>A number with a fixed number of decimals; a negative number of them rounds to tens, hundreds and so on.</summary>
    public static string Fixed(double value, int decimals)
    {
        if (decimals < 0 && double.IsFinite(value))
        {
            double step = Math.Pow(10, -decimals);
            return Fixed(Math.Round(value / step, MidpointRounding.ToEven) * step, 0);
        }

        decimals = Math.Max(0, decimals);
        string text = Math.Round(value, decimals, MidpointRounding.ToEven).ToString("F" + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return text.AsSpan().TrimStart('-').ContainsAnyExcept("0.") ? text : text.TrimStart('-');
    }

    /// <summary>A whole number.</summary>
    public static string Count(int count) => count.ToString(CultureInfo.InvariantCulture);

    /// <summary>A probability in percent; never rounded up to certainty.</summary>
    public static string Percent(double probability) => probability switch
    {
        > 0.999 and < 1 => "over 99.9 %",
        < 0.001 and > 0 => "under 0.1 %",
        _ => Fixed(probability * 100, 1) + " %",
    };

    /// <summary>A duration in whole minutes, or in seconds below two minutes.</summary>
    public static string Duration(TimeSpan duration) => duration switch
    {
        { TotalMinutes: < 2 } => Fixed(duration.TotalSeconds, 0) + " s",
        { TotalHours: < 3 } => Fixed(duration.TotalMinutes, 0) + " min",
        { TotalDays: < 3 } => Fixed(duration.TotalHours, 1) + " h",
        _ => Fixed(duration.TotalDays, 0) + " days",
    };

    /// <summary>Decimals that leave so many significant digits after rounding: 0.0996 with two is 0.10, and 186 is 190.</summary>
    private static int Decimals(double value, int digits)
    {
        double magnitude = Math.Abs(value);
        if (magnitude is 0 || !double.IsFinite(magnitude))
        {
            return 0;
        }

        int decimals = digits - 1 - (int)Math.Floor(Math.Log10(magnitude));
        bool carries = Math.Round(magnitude * Math.Pow(10, decimals), MidpointRounding.ToEven) >= Math.Pow(10, digits);
        return Math.Min(carries ? decimals - 1 : decimals, MostDecimals);
    }
}
