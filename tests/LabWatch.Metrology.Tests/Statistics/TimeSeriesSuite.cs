using System.Globalization;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Statistics;

public sealed class TimeSeriesSuite : CheckSuite
{
    public override string Title => "Statistics of time series";

    public override string Introduction =>
        "Deviations of the two data sets of NIST SP 1065 (tables 30 and 31), certified univariate and regression results of the NIST Statistical Reference Datasets, "
        + "effective sample size, Student's t, Mann-Kendall and Sen, and the R-statistic with its quantiles.";

    protected override IEnumerable<Check> Build() => CheckRow.Read("t06_timeseries.csv").Select(row => Check.Of(row, () => Compute(row)));

    private static double Compute(CheckRow row) => row.Group switch
    {
        "sp1065_nbs9" or "sp1065_lcg1000" or "sp1065_extra" => Deviation(row),
        "sp1065_summary" => OfSummary(row.Quantity, ReferenceSeries.Sp1065(row.Text("dataset"))),
        "strd_univariate" => OfSummary(row.Quantity, ReferenceSeries.Univariate(row.Text("dataset"))),
        "strd_regression" => Regression(row),
        "ar1_effective_n" => SampleSize(row),
        "student_t_table" or "student_t_exact" => -StudentDistribution.UpperQuantile(row.Number("p"), row.Number("nu")),
        "mann_kendall" => Trend(row),
        "mann_kendall_exact" => MannKendall.UpperProbability((int)row.Number("n"), (int)row.Number("s")),
        "cao_rhinehart_R" => Ratio(row),
        "cao_rhinehart_critical" => Critical(row),
        _ => throw new FormatException(row.Group),
    };

    private static double Deviation(CheckRow row)
    {
        double[] values = ReferenceSeries.Sp1065(row.Text("dataset"));
        int m = (int)row.Number("m");
        return row.Quantity switch
        {
            "adev (non-overlapping)" => AllanDeviation.NonOverlapping(values, m).Deviation,
            "overlapping adev" => AllanDeviation.Overlapping(values, m).Deviation,
            "mdev" => AllanDeviation.Modified(values, m).Deviation,
            "tdev" => AllanDeviation.Modified(values, m).Deviation * m * row.Number("tau0") / Math.Sqrt(3),
            "hdev (non-overlapping)" => HadamardDeviation.NonOverlapping(values, m),
            "overlapping hdev" => HadamardDeviation.Overlapping(values, m),
            "totdev" => HadamardDeviation.Total(values, m),
            _ => throw new FormatException(row.Quantity),
        };
    }

    private static double OfSummary(string quantity, double[] values) => quantity switch
    {
        "mean" => Summary.Of(values).Mean,
        "max" => Summary.Of(values).Maximum,
        "min" => Summary.Of(values).Minimum,
        "median" => Median.Of(values),
        "sd (n-1)" => Summary.Of(values).StandardDeviation,
        "lag-1 autocorrelation" => Autocorrelation.OfNeighbours(values),
        "intercept (x=1..n)" => LeastSquares.Fit([.. values.Select((_, i) => new double[] { 1, i + 1 })], values)!.Coefficients[0].Value,
        _ => throw new FormatException(quantity),
    };

    private static double Regression(CheckRow row)
    {
        LeastSquares fit = ReferenceSeries.Regression(row.Text("dataset"));
        if (row.Quantity == "residual sd") return fit.ResidualDeviation;
        bool isError = row.Quantity.StartsWith("se(", StringComparison.Ordinal);
        int index = int.Parse(row.Quantity.Trim('s', 'e', '(', ')', 'b'), CultureInfo.InvariantCulture);
        return isError ? fit.Coefficients[index].StandardUncertainty : fit.Coefficients[index].Value;
    }

    private static double SampleSize(CheckRow row)
    {
        (int n, double rho) = ((int)row.Number("n"), row.Number("rho"));
        if (row.Quantity.StartsWith("n_eff asymptotic", StringComparison.Ordinal)) return Autocorrelation.AsymptoticSampleSize(n, rho);
        double exact = Autocorrelation.EffectiveSampleSize(n, rho);
        return row.Quantity.StartsWith("sd", StringComparison.Ordinal) ? 1 / Math.Sqrt(exact) : exact;
    }

    private static double Trend(CheckRow row)
    {
        double[] values = row.Numbers("series");
        MannKendall test = MannKendall.Of(values);
        return row.Quantity switch
        {
            "S" => test.S,
            "Var(S) with tie correction" => test.Variance,
            "Z with continuity correction" => test.Z,
            "two-sided p (normal)" => test.Probability,
            _ => TheilSenTrend.Of([.. values.Select((_, i) => i * 86_400_000_000L)], values, 0).SlopePerDay,
        };
    }

    private static double Ratio(CheckRow row)
    {
        double[] factors = row.Numbers("lambda1,2,3");
        var statistic = new RStatistic(factors[0], factors[1], factors[2]);
        int last = int.Parse(row.Quantity["R after sample ".Length..], CultureInfo.InvariantCulture);
        foreach (double value in row.Numbers("series").Take(last + 1)) statistic.Add(value);
        return statistic.Ratio;
    }

    private static double Critical(CheckRow row)
    {
        double[] factors = [.. row.Text("lambda1/2/3").Split('/').Select(text => double.Parse(text, CultureInfo.InvariantCulture))];
        var distribution = RStatisticDistribution.Of(factors[0], factors[1], factors[2]);
        return row.Quantity == "mean of R"
            ? distribution.Mean
            : distribution.Quantile(double.Parse(row.Quantity[(row.Quantity.IndexOf("p=", StringComparison.Ordinal) + 2)..], CultureInfo.InvariantCulture));
    }
}
