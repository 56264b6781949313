using System.Globalization;

namespace LabWatch.Alerts.Messages;

/// <summary>Writes numbers, durations and names the way messages show them; independent of the machine's culture.</summary>
internal static class Phrase
{
    /// <summary>Longest headline, characters.</summary>
    public const int LongestHeadline = 160;

    /// <summary>Fills the placeholders of a text.</summary>
    public static string Fill(string text, params ReadOnlySpan<object?> values) => string.Format(CultureInfo.InvariantCulture, text, values);

    /// <summary>A headline cut to its length.</summary>
    public static string Headline(string text, params ReadOnlySpan<object?> values) => Cut(Fill(text, values), LongestHeadline);

    /// <summary>A text cut to a length, with three dots where something is missing.</summary>
    public static string Cut(string text, int length)
    {
        if (text.Length <= length)
        {
            return text;
        }

        int end = length - 3;
        return string.Concat(text.AsSpan(0, char.IsHighSurrogate(text[end - 1]) ? end - 1 : end), "...");
    }

    /// <summary>A temperature in degree Celsius with one decimal where it says something.</summary>
    public static string Celsius(double value) => value.ToString("0.#", CultureInfo.InvariantCulture);

    /// <summary>A value with four significant digits.</summary>
    public static string Number(double value) => value.ToString("G4", CultureInfo.InvariantCulture);

    /// <summary>A duration in the unit that suits it, rounded down.</summary>
    public static string Duration(TimeSpan duration) => duration switch
    {
        { TotalSeconds: < 1 } => Fill("{0:0} ms", Math.Floor(duration.TotalMilliseconds)),
        { TotalSeconds: < 120 } => Fill("{0:0} s", Math.Floor(duration.TotalSeconds)),
        { TotalMinutes: < 120 } => Fill("{0:0} min", Math.Floor(duration.TotalMinutes)),
        { TotalHours: < 48 } => Fill("{0:0} h", Math.Floor(duration.TotalHours)),
        _ => Fill("{0:0} days", Math.Floor(duration.TotalDays)),
    };

    /// <summary>A value with its unit the way people read it: degC for the SenML name Cel, nothing for / and 1.</summary>
    public static string Quantity(double value, string unit) => unit switch
    {
        "/" or "1" or "" => Number(value),
        "Cel" => Number(value) + " degC",
        _ => $"{Number(value)} {unit}",
    };
}
