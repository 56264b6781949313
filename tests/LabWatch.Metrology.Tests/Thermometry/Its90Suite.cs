using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class Its90Suite : CheckSuite
{
    private static readonly Dictionary<string, SprtSubrange> Subranges = new(StringComparer.Ordinal)
    {
        ["0..29.7646"] = SprtSubrange.WaterToGallium,
        ["0..156.5985"] = SprtSubrange.WaterToIndium,
        ["0..231.928"] = SprtSubrange.WaterToTin,
        ["0..419.527"] = SprtSubrange.WaterToZinc,
        ["0..660.323"] = SprtSubrange.WaterToAluminium,
        ["0..961.78"] = SprtSubrange.WaterToSilver,
        ["-38.8344..29.7646"] = SprtSubrange.MercuryToGallium,
        ["-189.3442..0.01"] = SprtSubrange.ArgonToWater,
    };

    private IReadOnlyList<CheckRow> _rows = [];

    public override string Title => "Platinum resistance thermometers on the ITS-90 (reference and deviation functions, zero power)";

    public override string Introduction =>
        "Ratios at the fixed points as published, and both directions of every function computed elsewhere to 50 digits. The thermometers are invented.";

    protected override IEnumerable<Check> Build()
    {
        _rows = CheckRow.Read("t01_its90_prt.csv");
        return _rows.Select(row => Check.Of(row, () => Compute(row)));
    }

    private double Compute(CheckRow row) => row.Group switch
    {
        "Wr_fixed_point_table" => Its90.Ratio(row.Number("T90_K")),
        "Wr_low" when row.Quantity.Contains("residue") => Its90.RatioLow(row.Number("T90_K")) - 1,
        "Wr_high" when row.Quantity.Contains("residue") => Its90.RatioHigh(row.Number("T90_K")) - 1,
        "Wr_low" => Its90.RatioLow(row.Number("T90_K")),
        "Wr_high" => Its90.RatioHigh(row.Number("T90_K")),
        "inverse_low" => Its90.KelvinLow(row.Number("Wr")),
        "inverse_low_approx" => Its90.ApproximateKelvinLow(row.Number("Wr")),
        "inverse_high" => Its90.KelvinHigh(row.Number("Wr")),
        "inverse_high_approx" => Its90.ApproximateKelvinHigh(row.Number("Wr")),
        "dWrdT" => Its90.RatioSlope(row.Number("T90_K")),
        "criteria" => row.Expected switch
        {
            "1.11807" => SprtCriteria.LeastAtGallium,
            "0.844235" => SprtCriteria.GreatestAtMercury,
            _ => SprtCriteria.LeastAtSilver,
        },
        "self_heating" => AtZeroPower(row),
        "fit_coefficients" => Fitted(row),
        _ => OfThermometer(row),
    };

    private static double OfThermometer(CheckRow row)
    {
        SprtSubrange subrange = Subranges[row.Text("subrange_C")];
        SprtDeviation deviation = new(
            subrange,
            [.. SprtSubranges.Coefficients(subrange).Select(row.Number)],
            row.Has("W660") ? row.Number("W660") : double.NaN);
        Sprt sprt = new(row.Number("R_TPW_ohm"), deviation, null);
        return row.Unit switch
        {
            "1" => deviation.RatioAt(row.Number("t90_C") + Its90.CelsiusOffset),
            "ohm" => sprt.ResistanceOhm(row.Number("t90_C")),
            _ => sprt.Evaluate(row.Number("R_ohm"), 0).Celsius.Value,
        };
    }

    private static double AtZeroPower(CheckRow row)
    {
        bool isUncertainty = row.Has("u_ohm");
        double u = isUncertainty ? row.Number("u_ohm") : 0;
        Estimate first = new(isUncertainty ? 100 : row.Number("R1_ohm"), u);
        Estimate second = new(isUncertainty ? 100 : row.Number("R2_ohm"), u);
        Estimate zero = ZeroPower.Extrapolate(first, row.Number("I1_mA"), second, row.Number("I2_mA"));
        return isUncertainty ? zero.StandardUncertainty : zero.Value;
    }

    private double Fitted(CheckRow row)
    {
        if (row.Has("W_Al"))
        {
            // The other two points, tin and zinc, are those of the fit up to zinc.
            CheckRow below = _rows.First(other => other.Group == "fit_coefficients" && other.Text("subrange_C") == "0..419.527");
            return SprtFit.Solve(
                SprtSubrange.WaterToSilver,
                [.. PointsOf(below), (933.473, row.Number("W_Al")), (1234.93, row.Number("W_Ag"))]).Coefficients[3];
        }

        SprtSubrange subrange = Subranges[row.Text("subrange_C")];
        SprtDeviation fit = SprtFit.Solve(subrange, PointsOf(row));
        return fit.Coefficients[row.Quantity[0] - 'a'];
    }

    private static List<(double Kelvin, double Ratio)> PointsOf(CheckRow row) =>
        [.. row.Json("points").EnumerateArray().Select(point => (CheckRow.ToNumber(point.GetProperty("T90_K")), CheckRow.ToNumber(point.GetProperty("W"))))];
}
