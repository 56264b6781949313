using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Hazards;

public sealed class HazardSuite : CheckSuite
{
    public override string Title => "Hazards (burn thresholds, dew and frost point, cooling)";

    public override string Introduction =>
        "Burn thresholds of ISO 13732-1 are from memory on both sides: this shows that the program holds what was remembered, not that it is right."
        + " Vapour pressures of four published formulas, and closed forms computed elsewhere to 30 digits.";

    public override IReadOnlyList<(string Rows, string Reason)> NotApplicable =>
    [
        ("upper edges at 1 s", "the program uses the lower edge of each band"),
        ("bands at 10 s", "low confidence: the program does not use them, but takes the threshold for 1 min from 1 s on"),
        ("ordering", "a property, tested as such"),
        ("coated metal at short contact", "not given: the program treats it as bare metal"),
    ];

    protected override IEnumerable<Check> Build() =>
        CheckRow.Read("t10_hazards.csv").Select(row => Compute(row) is { } compute ? Check.Of(row, compute) : null).OfType<Check>();

    private static Func<double>? Compute(CheckRow row) => row.Group switch
    {
        "burn_threshold_long" => () => BurnThreshold.Celsius(MaterialOf(row), ContactOf(row)),
        "burn_threshold_1s" when row.Quantity.Contains("lower") => () => BurnThreshold.Celsius(MaterialOf(row), TimeSpan.FromSeconds(1)),
        "cross_check" when row.Number("t_C") < 0 => () => SaturationPressure.OverIce(row.Number("t_C"), FormulaOf(row)),
        "es_water" or "cross_check" => () => SaturationPressure.OverWater(row.Number("t_C"), FormulaOf(row)),
        "es_ice" => () => SaturationPressure.OverIce(row.Number("t_C"), FormulaOf(row)),
        "dew_point" => () => Humidity.DewPoint(new Estimate(row.Number("t_C"), 0), new Estimate(row.Number("RH_pct"), 0), FormulaOf(row)).Value,
        "dew_point_closed" =>
            () => Humidity.DewPoint(new Estimate(row.Number("t_C"), 0), new Estimate(row.Number("RH_pct"), 0), SaturationFormula.Wmo).Value,
        "frost_point" => () => Humidity.FrostPoint(new Estimate(row.Number("t_C"), 0), new Estimate(row.Number("RH_pct"), 0), FormulaOf(row)).Value,
        "rh_from_frost" => () => Humidity.RelativeOfFrostPoint(row.Number("t_C"), row.Number("frost_point_C"), FormulaOf(row)),
        "moisture_ppmv" =>
            () => Humidity.MoleRatio(SaturationPressure.OverIce(row.Number("frost_point_C"), FormulaOf(row)), row.Number("p_Pa")),
        "newton_cooling" => () => Cooling(row),
        _ => null,
    };

    private static double Cooling(CheckRow row) => row.Quantity switch
    {
        "time to reach target" =>
            NewtonCooling.TimeTo(row.Number("T_start_C"), row.Number("T_ambient_C"), row.Number("tau_s"), row.Number("T_target_C")),
        "temperature after 2 tau" =>
            NewtonCooling.TemperatureAfter(row.Number("T_start_C"), row.Number("T_ambient_C"), row.Number("tau_s"), 2 * row.Number("tau_s")),
        _ => NewtonCooling.TimeConstant(row.Number("T1_C"), row.Number("T2_C"), row.Number("T_ambient_C"), row.Number("dt_s")),
    };

    private static SaturationFormula FormulaOf(CheckRow row) => row.Text("formula") switch
    {
        "WMO-CIMO" => SaturationFormula.Wmo,
        "Sonntag 1990" => SaturationFormula.Sonntag,
        "Hyland-Wexler 1983" => SaturationFormula.HylandWexler,
        _ => SaturationFormula.Hardy,
    };

    private static SurfaceMaterial MaterialOf(CheckRow row) => row.Text("material").Split(' ', ',')[0] switch
    {
        "uncoated" => SurfaceMaterial.UncoatedMetal,
        "coated" => SurfaceMaterial.CoatedMetal,
        "ceramics" => SurfaceMaterial.CeramicGlassStone,
        "plastics" => SurfaceMaterial.Plastic,
        _ => SurfaceMaterial.Wood,
    };

    private static TimeSpan ContactOf(CheckRow row) => row.Text("contact") switch
    {
        "1 min" => TimeSpan.FromMinutes(1),
        "10 min" => TimeSpan.FromMinutes(10),
        _ => TimeSpan.FromHours(8),
    };
}
