using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Statistics;

public sealed class ControlChartSuite : CheckSuite
{
    public override string Title => "Run lengths of control charts";

    public override string Introduction =>
        "Average run lengths of EWMA (Lucas and Saccucci) and CUSUM charts (Lucas and Crosier, Hawkins), and the constants of Shewhart charts: published to the digits "
        + "of the tables, and computed elsewhere from the integral equation of the run length to 1e-6.";

    protected override IEnumerable<Check> Build() => CheckRow.Read("t07_control_charts.csv").Select(row => Check.Of(row, () => Compute(row)));

    private static double Compute(CheckRow row) => row.Group switch
    {
        "ewma_lucas_saccucci" or "ewma_exact" => RunLength.OfEwma(row.Number("lambda"), row.Number("L"), row.Number("shift")),
        "cusum_two_sided_table" or "cusum_two_sided_exact" => RunLength.OfTwoSidedCusum(row.Number("k"), row.Number("h"), row.Number("shift")),
        "cusum_one_sided_exact" => RunLength.OfCusum(row.Number("k"), row.Number("h"), row.Number("shift")),
        "cusum_fir_table" or "cusum_fir_exact" =>
            RunLength.OfTwoSidedCusum(row.Number("k"), row.Number("h"), row.Number("shift"), row.Number("headstart")),
        "cusum_hawkins" => RunLength.CusumInterval(row.Number("k"), 370),
        "cusum_siegmund" => RunLength.SiegmundCusum(row.Number("k"), row.Number("h"), row.Number("shift")),
        "shewhart_arl" => row.Has("L") ? RunLength.OfSingleValues(row.Number("L"), 0) : RunLength.OfSingleValues(3, row.Number("shift")),
        _ => Constant(row.Quantity, (int)row.Number("n")),
    };

    private static double Constant(string name, int n) => name switch
    {
        "c4" => ShewhartConstants.C4(n),
        "d2" => ShewhartConstants.D2(n),
        "d3" => ShewhartConstants.D3Small(n),
        "A2" => ShewhartConstants.A2(n),
        "A3" => ShewhartConstants.A3(n),
        "B3" => ShewhartConstants.B3(n),
        "B4" => ShewhartConstants.B4(n),
        "D3" => ShewhartConstants.D3(n),
        "D4" => ShewhartConstants.D4(n),
        _ => throw new FormatException(name),
    };
}
