using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Standard platinum resistance thermometers on the ITS-90, both ways.</summary>
internal sealed class PrtIts90Calculator : Calculator
{
    private static readonly string[] Given = ["r_ohm", "two_currents", "t_c"];

    private static readonly IReadOnlyList<CalcField> Deviation =
    [
        CalcField.Choice("subrange", "subrange of the ITS-90", Slugged<SprtSubrange>.Names),
        CalcField.Number("a", "coefficient a"),
        CalcField.Number("b", "coefficient b; 0 where missing").Optional(),
        CalcField.Number("c", "coefficient c; 0 where missing").Optional(),
        CalcField.Number("d", "coefficient d; 0 where missing").Optional(),
        CalcField.Number("c1", "coefficient c1 of a low subrange; 0 where missing").Optional(),
        CalcField.Number("c2", "coefficient c2 of a low subrange; 0 where missing").Optional(),
        CalcField.Number("c3", "coefficient c3 of a low subrange; 0 where missing").Optional(),
        CalcField.Number("c4", "coefficient c4 of a low subrange; 0 where missing").Optional(),
        CalcField.Number("c5", "coefficient c5 of a low subrange; 0 where missing").Optional(),
        CalcField.Positive("w_660", "W(660.323 degC) for the term of d; computed from a, b, c where missing").Optional(),
    ];

    public override string Name => "prt-its90";

    public override string Summary => "Temperature t90 from the resistance of a standard platinum thermometer, or resistance from temperature.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "W = R / R(TPW); Wr = W - deviation(W); t90 from Wr by the exact inverse of the reference function",
        "zero power: R0 = R1 - (R2 - R1) I1^2 / (I2^2 - I1^2)",
        "u(t)^2 = (u(R) dt/dR)^2 + (u(R_TPW) dt/dR_TPW)^2 + u_cal^2",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "H. Preston-Thomas, Metrologia 27 (1990) 3-10 and 107, equations 9a, 10a, 12, 13, 14, table 4",
        "Guide to the Realization of the ITS-90, platinum resistance thermometry (zero power)",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Positive("r_ohm", "resistance, ohm; give this, two_currents or t_c").Optional(),
        CalcField.NotNegative("u_r_ohm", "standard uncertainty of r_ohm, ohm; 0 where missing").Optional(),
        CalcField.Object(
            "two_currents",
            "measurements at two currents, extrapolated to zero power",
            CalcField.Positive("i1_ma", "first current, mA"),
            CalcField.Positive("r1_ohm", "resistance at the first current, ohm"),
            CalcField.Positive("i2_ma", "second current, mA"),
            CalcField.Positive("r2_ohm", "resistance at the second current, ohm"),
            CalcField.NotNegative("u_r1_ohm", "standard uncertainty of r1_ohm, ohm; 0 where missing").Optional(),
            CalcField.NotNegative("u_r2_ohm", "standard uncertainty of r2_ohm, ohm; 0 where missing").Optional()).Optional(),
        CalcField.Celsius("t_c", "temperature t90, degree Celsius").Optional(),
        CalcField.Positive("r_tpw_ohm", "R(TPW) in force, ohm"),
        CalcField.NotNegative("u_r_tpw_ohm", "its standard uncertainty, ohm; 0 where missing").Optional(),
        CalcField.NotNegative("u_cal_k", "standard uncertainty of the calibration, kelvin; 0 where missing").Optional(),
        CalcField.Object("below", "deviation function for W up to 1", Deviation).Optional(),
        CalcField.Object("above", "deviation function for W above 1", Deviation).Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("t_c", "temperature t90, degree Celsius"),
        ("u_t_k", "its standard uncertainty, kelvin; null outside the subrange"),
        ("r_ohm", "resistance (at zero power where two currents were given), ohm"),
        ("w", "ratio W = R / R(TPW)"),
        ("dt_dr_k_per_ohm", "sensitivity, kelvin per ohm"),
        ("in_range", "whether the temperature lies in the subrange"),
    ];

    public override string Example =>
        """{ "r_ohm": 54.7, "u_r_ohm": 0.00002, "r_tpw_ohm": 25.479112, "u_r_tpw_ohm": 0.00001, "u_cal_k": 0.0005, "above": { "subrange": "water-to-zinc", "a": -1.9736e-4, "b": -2.114e-5 } }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        string[] given = [.. Given.Where(input.Has)];
        SprtDeviation? below = Read(input.Object("below"));
        SprtDeviation? above = Read(input.Object("above"));
        if (given.Length != 1 || (below ?? above) is null)
        {
            input.Reject("one-of", string.Empty, "Exactly one of r_ohm, two_currents and t_c is needed, and below or above.", "See --example.");
            return;
        }

        Sprt sprt = new(input.Number("r_tpw_ohm"), below, above);
        Estimate resistance = given[0] switch
        {
            "r_ohm" => new(input.Number("r_ohm"), input.Number("u_r_ohm", 0)),
            "t_c" => new(sprt.ResistanceOhm(input.Number("t_c")), input.Number("u_r_ohm", 0)),
            _ => AtZeroPower(input.Object("two_currents")!),
        };
        if (!double.IsFinite(resistance.Value))
        {
            input.Reject("equal-currents", given[0], "The two currents are equal, or the temperature has no resistance.", "Use currents that differ.");
            return;
        }

        TemperatureEvaluation bare = sprt.Evaluate(resistance.Value, 0);
        double fromResistance = bare.Sensitivity * resistance.StandardUncertainty;
        double fromTriplePoint = sprt.SensitivityToTriplePoint(resistance.Value) * input.Number("u_r_tpw_ohm", 0);
        double u = double.Hypot(double.Hypot(fromResistance, fromTriplePoint), input.Number("u_cal_k", 0));
        TemperatureEvaluation evaluation = sprt.Evaluate(resistance.Value, u);
        double ratio = resistance.Value / sprt.TriplePointOhm;
        SprtDeviation used = (ratio <= 1 ? below ?? above : above ?? below)!;
        result.Add("t_c", "u_t_k", evaluation.Celsius)
            .Add("r_ohm", resistance.Value)
            .Add("w", ratio)
            .Add("dt_dr_k_per_ohm", evaluation.Sensitivity)
            .Add("in_range", evaluation.InRange)
            .Step("deviation", used.Value(ratio))
            .Step("wr", ratio - used.Value(ratio))
            .Step("dwr_dt_per_k", Its90.RatioSlope(evaluation.Celsius.Value + Its90.CelsiusOffset))
            .Step("u_from_r_k", Math.Abs(fromResistance))
            .Step("u_from_r_tpw_k", Math.Abs(fromTriplePoint));
    }

    private static SprtDeviation? Read(CalcInput? input)
    {
        if (input is null)
        {
            return null;
        }

        SprtSubrange subrange = Slugged<SprtSubrange>.Parse(input.Text("subrange"));
        IReadOnlyList<string> names = SprtSubranges.Coefficients(subrange);
        foreach (string name in Deviation.Skip(1).Select(field => field.Name).Where(name => input.Has(name) && name != "w_660" && !names.Contains(name)))
        {
            input.Reject("unknown-coefficient", name, $"The subrange has no coefficient {name}.", $"Its coefficients are {string.Join(", ", names)}.");
        }

        return new(subrange, [.. names.Select(name => input.Number(name, 0))], input.Number("w_660"));
    }

    private static Estimate AtZeroPower(CalcInput input) => ZeroPower.Extrapolate(
        new(input.Number("r1_ohm"), input.Number("u_r1_ohm", 0)),
        input.Number("i1_ma"),
        new(input.Number("r2_ohm"), input.Number("u_r2_ohm", 0)),
        input.Number("i2_ma"));
}
