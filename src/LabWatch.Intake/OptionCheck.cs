using System.Globalization;
using LabWatch.Lab.Findings;

namespace LabWatch.Intake;

/// <summary>The checks that several option records share.</summary>
internal static class OptionCheck
{
    public const string OutOfRange = "option-out-of-range";
    public const string Invalid = "option-invalid";

    public static IEnumerable<Finding> Range(string where, long value, long minimum, long maximum)
    {
        if (value < minimum || value > maximum)
        {
            yield return new Finding(
                OutOfRange,
                where,
                string.Create(CultureInfo.InvariantCulture, $"The value must be {minimum} to {maximum}."),
                value.ToString(CultureInfo.InvariantCulture),
                "Set it within the range or leave it out.");
        }
    }

    public static IEnumerable<Finding> Range(string where, TimeSpan value, TimeSpan minimum, TimeSpan maximum)
    {
        if (value < minimum || value > maximum)
        {
            yield return new Finding(
                OutOfRange,
                where,
                string.Create(CultureInfo.InvariantCulture, $"The duration must be {minimum:c} to {maximum:c}."),
                value.ToString("c", CultureInfo.InvariantCulture),
                "Set it within the range or leave it out.");
        }
    }

    public static IEnumerable<Finding> Must(bool condition, string where, string message, string? value, string cure)
    {
        if (!condition)
        {
            yield return new Finding(Invalid, where, message, Finding.Quote(value), cure);
        }
    }
}
