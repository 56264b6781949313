using System.Collections.Concurrent;
using System.Globalization;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Statistics;

/// <summary>The data sets of NIST SP 1065 and of the NIST Statistical Reference Datasets.</summary>
internal static class ReferenceSeries
{
    private static readonly ConcurrentDictionary<string, LeastSquares> Fits = new(StringComparer.Ordinal);

    public static double[] Sp1065(string name) =>
        [.. CsvFile.Read("data_sp1065.csv").Where(row => row["dataset"] == name).Select(row => Fraction(row["value"]))];

    /// <summary>The NumAcc sets are made by their rule; Michelson's speed of light is read.</summary>
    public static double[] Univariate(string name) => name switch
    {
        "NumAcc1" => [10000001, 10000003, 10000002],
        "NumAcc2" => Alternating(1.2, 1.1, 1.3),
        "NumAcc3" => Alternating(1000000.2, 1000000.1, 1000000.3),
        "NumAcc4" => Alternating(10000000.2, 10000000.1, 10000000.3),
        _ => [.. CsvFile.Read("data_strd_michelso.csv").Select(row => Number(row["value"]))],
    };

    public static LeastSquares Regression(string name) => Fits.GetOrAdd(name, _ =>
    {
        IReadOnlyDictionary<string, string>[] rows = [.. CsvFile.Read("data_strd_regression.csv").Where(row => row["dataset"] == name)];
        return LeastSquares.Fit([.. rows.Select(row => Regressors(name, row))], [.. rows.Select(row => Number(row["y"]))])!;
    });

    private static double[] Regressors(string name, IReadOnlyDictionary<string, string> row)
    {
        double x = Number(row["x1"]);
        return name switch
        {
            "Norris" => [1, x],
            "Pontius" => [1, x, x * x],
            "NoInt1" or "NoInt2" => [x],
            "Longley" => [1, .. Enumerable.Range(1, 6).Select(i => Number(row["x" + i.ToString(CultureInfo.InvariantCulture)]))],
            _ => [.. Enumerable.Range(0, 6).Select(power => Math.Pow(x, power))],
        };
    }

    private static double[] Alternating(double first, double low, double high) =>
        [first, .. Enumerable.Range(0, 1000).Select(i => i % 2 == 0 ? low : high)];

    private static double Fraction(string text) => text.Split('/') is [string above, string below] ? Number(above) / Number(below) : Number(text);

    private static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
