using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class FixedPointSuite : CheckSuite
{
    public override string Title => "Fixed points and radiation thermometry above the silver point (ITS-90)";

    public override string Introduction =>
        "Defining temperatures, pressure and immersion effects, and equation 15 of the scale with c2 = 0.014388 m K both ways.";

    public override IReadOnlyList<(string Rows, string Reason)> NotApplicable =>
        [("group htfp", "thermodynamic temperatures of eutectic fixed points, from memory: the program holds none, and a certificate states what a laboratory uses")];

    protected override IEnumerable<Check> Build() =>
        CheckRow.Read("t05_fixed_points.csv").Where(row => row.Group != "htfp").Select(row => Check.Of(row, () => Compute(row)));

    private static double Compute(CheckRow row) => row.Group switch
    {
        "fixed_points" when !row.Has("point") => FixedPoint.Find("H2O TP")!.Celsius,
        "fixed_points" => row.Unit == "K" ? PointOf(row, "point").Kelvin : PointOf(row, "point").Celsius,
        "pressure_effect" => row.Quantity == "dT/dp" ? PointOf(row, "point").PressureEffect : PointOf(row, "point").ImmersionEffect,
        "immersion_correction" => PointOf(row, "point").KelvinAtDepth(row.Number("h_m")),
        "signal_ratio" => Its90Radiation.Ratio(row.Number("lambda_um"), row.Number("T90_K"), ReferenceOf(row)),
        "T90_from_ratio" => Its90Radiation.Temperature(row.Number("lambda_um"), row.Number("ratio"), ReferenceOf(row)),
        "c2_effect" => EffectOfConstant(row),
        _ => Its90Radiation.UncertaintyOfReference(row.Number("T_K"), ReferenceOf(row), 10),
    };

    private static FixedPoint PointOf(CheckRow row, string member) => FixedPoint.Find(row.Text(member))!;

    private static double ReferenceOf(CheckRow row) => FixedPoint.Find($"{row.Text("X")} FP")!.Kelvin;

    /// <summary>The temperature that the SI constant gives for the ratio that the scale's constant defines, minus the scale's.</summary>
    private static double EffectOfConstant(CheckRow row)
    {
        double micrometre = row.Number("lambda_um");
        double ratio = Its90Radiation.Ratio(micrometre, row.Number("T90_K"), ReferenceOf(row));
        return PlanckLaw.Temperature(micrometre, ratio * PlanckLaw.Radiance(micrometre, ReferenceOf(row))) - row.Number("T90_K");
    }
}
