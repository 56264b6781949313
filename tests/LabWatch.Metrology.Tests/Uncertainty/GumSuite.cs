using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class GumSuite : CheckSuite
{
    private CheckRow? _end;

    public override string Title => "Propagation of uncertainty (JCGM 100 annex H, Welch-Satterthwaite, global risks, E_n, weighted means)";

    public override string Introduction =>
        "The worked examples H.1, H.2 and H.3 of the GUM to the digits printed, and formulas computed elsewhere to 40 digits.";

    public override IReadOnlyList<(string Rows, string Reason)> NotApplicable =>
    [
        (TruncationRow, "nu_eff is 125 exactly; the expected factor is that of 124, because the outside computation truncated a value that rounding had"
            + " left just below 125. A test shows it."),
    ];

    /// <summary>The row whose expected value is the factor for 124 instead of 125 degrees of freedom.</summary>
    internal const string TruncationRow = "T08-046";

    protected override IEnumerable<Check> Build()
    {
        List<CheckRow> rows = [.. CheckRow.Read("t08_gum_conformity.csv"), .. CheckRow.Read("t09_combination.csv")];
        _end = rows.First(row => row.Group == "gum_H1");
        return rows.Where(row => row.Id != TruncationRow).Select(row => Compute(row) is { } compute ? Check.Of(row, compute) : null).OfType<Check>();
    }

    private Func<double>? Compute(CheckRow row) => row.Group switch
    {
        "gum_H1" => () => EndGauge(row),
        "gum_H2" => () => Impedance(row),
        "gum_H3_thermometer" => () => ThermometerLine(row),
        "welch_satterthwaite" => () => Welch(row),
        "global_risk" => () => Risk(row),
        "en_number" => () => NormalizedError.Of(row.Number("x"), row.Number("Ux"), row.Number("X"), row.Number("UX")),
        "weighted_mean" => () => Mean(row),
        _ => null,
    };

    private double EndGauge(CheckRow row)
    {
        EndGaugeExample example = new(_end!);
        return row.Quantity switch
        {
            "u(dbar)" => example.MeanDifference,
            "u(d) combined" => example.Difference.Combined.StandardUncertainty,
            "u(delta theta)" => example.TemperatureDifference,
            "u(theta)" => example.Temperature,
            "|c|u for delta theta" => Math.Abs(example.Budget.Inputs[3].Contribution),
            "uc(l)" => example.Budget.Combined.StandardUncertainty,
            "nu_eff(l)" => example.Budget.Combined.DegreesOfFreedom,
            "t99(16)" => CoverageFactor.For(16, 0.99),
            "U99" => CoverageFactor.For(16, 0.99) * example.Budget.Combined.StandardUncertainty,
            "l" => example.LengthMillimetre,
            "sensitivity c(alpha_S)" => EndGaugeExample.SensitivityToExpansion,
            "sensitivity c(theta)" => EndGaugeExample.SensitivityToTemperature,
            "sensitivity c(delta alpha) = -ls*theta" => Math.Abs(example.Budget.Inputs[2].Sensitivity),
            "uc with second-order terms" => example.WithSecondOrder,
            _ => double.NaN,
        };
    }

    private static double Impedance(CheckRow row)
    {
        ImpedanceExample example = new(row.Numbers("V"), row.Numbers("I_mA"), row.Numbers("phi_rad"));
        return row.Quantity switch
        {
            "R" => example.Value(0),
            "X" => example.Value(1),
            "Z" => example.Value(2),
            "u(R)" => example.Uncertainty(0),
            "u(X)" => example.Uncertainty(1),
            "u(Z)" => example.Uncertainty(2),
            "r(R,X)" => example.Correlation(0, 1),
            "r(R,Z)" => example.Correlation(0, 2),
            "r(X,Z)" => example.Correlation(1, 2),
            "u(V)" => example.Budget.Inputs[0].Quantity.StandardUncertainty,
            "u(I)" => example.Budget.Inputs[1].Quantity.StandardUncertainty,
            "u(phi)" => example.Budget.Inputs[2].Quantity.StandardUncertainty,
            "r(V,I)" => example.Budget.Correlations[0].Coefficient,
            "r(V,phi)" => example.Budget.Correlations[1].Coefficient,
            "r(I,phi)" => example.Budget.Correlations[2].Coefficient,
            _ => double.NaN,
        };
    }

    private static double ThermometerLine(CheckRow row)
    {
        CalibrationLine line = CalibrationLine.Fit(row.Numbers("t_k"), row.Numbers("b_k"), row.Number("t0_C"));
        return row.Quantity switch
        {
            "y1" => line.Intercept.Value,
            "s(y1)" => line.Intercept.StandardUncertainty,
            "y2" => line.Slope.Value,
            "s(y2)" => line.Slope.StandardUncertainty,
            "r(y1,y2)" => line.Correlation,
            "s" => line.ResidualDeviation,
            "b(30 C)" => line.At(30).Value,
            "u(b(30 C))" => line.At(30).StandardUncertainty,
            _ => double.NaN,
        };
    }

    private static double Welch(CheckRow row)
    {
        BudgetInput[] inputs =
        [
            .. row.Json("components_u_nu").EnumerateArray()
                .Select(pair => new BudgetInput("component", new Estimate(0, CheckRow.ToNumber(pair[0]), CheckRow.ToNumber(pair[1])), 1)),
        ];
        double degrees = new UncertaintyBudget(inputs).Combined.DegreesOfFreedom;
        return row.Quantity switch
        {
            "nu_eff" => degrees,
            "k for 95.45 % with truncated nu_eff" => CoverageFactor.For(Math.Floor(degrees)),
            _ => CoverageFactor.For(degrees),
        };
    }

    private static double Risk(CheckRow row)
    {
        Estimate process = new(0, row.Number("u_prior"));
        ToleranceInterval tolerance = ToleranceInterval.Symmetric(row.Number("T"));
        ToleranceInterval acceptance = ToleranceInterval.Symmetric(row.Number("A"));
        return row.Quantity.Contains("consumer")
            ? GlobalRisk.Consumer(process, row.Number("u_meas"), tolerance, acceptance)
            : GlobalRisk.Producer(process, row.Number("u_meas"), tolerance, acceptance);
    }

    private static double Mean(CheckRow row)
    {
        WeightedMean mean = WeightedMean.Of(row.Numbers("x"), row.Numbers("u"));
        return row.Quantity switch
        {
            "weighted mean" => mean.Value,
            "internal u" => mean.InternalUncertainty,
            "external u = R_B * internal" => mean.ExternalUncertainty,
            "chi2 obs" => mean.ChiSquared,
            "Birge ratio" => mean.BirgeRatio,
            "u expanded by max(1,R_B)" => mean.ExpandedByScatter,
            _ => mean.Probability,
        };
    }
}
