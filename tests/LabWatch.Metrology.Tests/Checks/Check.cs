using System.Globalization;

namespace LabWatch.Metrology.Tests.Checks;

/// <summary>One comparison of a computed value with a value from outside the project. The computation runs once, when first asked for.</summary>
public sealed class Check
{
    private readonly Lazy<CheckOutcome> _outcome;

    private Check(string id, string what, string source, string status, Func<CheckOutcome> evaluate)
    {
        Id = id;
        What = what;
        Source = source;
        Status = status;
        _outcome = new(evaluate);
    }

    public string Id { get; }

    /// <summary>The quantity with its inputs.</summary>
    public string What { get; }

    /// <summary>Where the expected value comes from.</summary>
    public string Source { get; }

    /// <summary>PC, PM, C or F, as in <see cref="CheckRow"/>.</summary>
    public string Status { get; }

    public CheckOutcome Outcome => _outcome.Value;

    /// <summary>A check of a number; the tolerance is absolute, or relative to the expected value.</summary>
    public static Check OfNumber(
        string id, string what, string source, string status, string expected, double tolerance, bool isRelative, Func<double> compute) =>
        new(id, what, source, status, () =>
        {
            double target = CheckRow.Parse(expected);
            double computed = compute();
            double permitted = isRelative ? tolerance * Math.Abs(target) : tolerance;
            double difference = Math.Abs(computed - target);
            return new(
                difference <= permitted,
                expected,
                Rounded(computed, permitted),
                string.Create(CultureInfo.InvariantCulture, $"{tolerance:G3}{(isRelative ? " rel" : string.Empty)}"),
                MarginOf(difference, permitted));
        });

    /// <summary>A check of a row's number with the row's tolerance; an exact row permits no difference.</summary>
    public static Check Of(CheckRow row, Func<double> compute) =>
        OfNumber(row.Id, WhatOf(row), row.Source, row.Status, row.Expected, row.Tolerance, row.ToleranceKind == "rel", compute);

    /// <summary>
    /// A check of a number that is uncertain on both sides: the difference may be four times the combined standard uncertainty, which one in 15 000 normal
    /// differences exceeds.
    /// </summary>
    public static Check OfEstimate(
        string id, string what, string source, string status, string expected, double uncertainty, Func<(double Value, double StandardError)> compute) =>
        new(id, what, source, status, () =>
        {
            double target = CheckRow.Parse(expected);
            (double computed, double error) = compute();
            double permitted = 4 * Math.Sqrt(uncertainty * uncertainty + error * error);
            double difference = Math.Abs(computed - target);
            return new(
                difference <= permitted,
                expected,
                Rounded(computed, permitted),
                string.Create(CultureInfo.InvariantCulture, $"{permitted:G3}"),
                MarginOf(difference, permitted));
        });

    /// <summary>A check of a row's text, letter by letter.</summary>
    public static Check OfText(CheckRow row, Func<string> compute) =>
        new(row.Id, WhatOf(row), row.Source, row.Status, () =>
        {
            string computed = compute();
            return new(computed == row.Expected, row.Expected, computed, "exact", "");
        });

    private static string WhatOf(CheckRow row) => row.InputText is "{}" or "" ? row.Quantity : $"{row.Quantity} {row.InputText}";

    /// <summary>A digit more than the tolerance has meaning for.</summary>
    private static string Rounded(double value, double permitted)
    {
        if (value == 0 || !double.IsFinite(value))
        {
            return value.ToString("R", CultureInfo.InvariantCulture);
        }

        double scale = permitted > 0 ? permitted : Math.Abs(value) * 1e-12;
        int digits = (int)Math.Ceiling(Math.Log10(Math.Abs(value) / scale)) + 1;
        return value.ToString($"G{Math.Clamp(digits, 2, 14)}", CultureInfo.InvariantCulture);
    }

    private static string MarginOf(double difference, double permitted) => (difference, permitted) switch
    {
        (0, _) => "0 %",
        (_, 0) => "exceeded",
        _ when difference < 0.01 * permitted => "< 1 %",
        _ => string.Create(CultureInfo.InvariantCulture, $"{100 * difference / permitted:F0} %"),
    };
}
