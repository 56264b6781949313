using LabWatch.Metrology.Thermometry;

namespace LabWatch.Service.Calc;

/// <summary>Callendar-Van Dusen both ways.</summary>
internal sealed class PrtCvdCalculator : Calculator
{
    public override string Name => "prt-cvd";

    public override string Summary => "Temperature from the resistance of an industrial platinum thermometer, or resistance from temperature.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "R(t) = R0 (1 + A t + B t^2) from 0 degC on; R(t) = R0 (1 + A t + B t^2 + C (t - 100 degC) t^3) below",
        "u(t)^2 = (u(R) dt/dR)^2 + u_cal^2",
    ];

    public override IReadOnlyList<string> Source { get; } = ["IEC 60751:2022, clause 4.2"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Positive("r_ohm", "resistance, ohm; give this or t_c").Optional(),
        CalcField.Celsius("t_c", "temperature, degree Celsius; give this or r_ohm").Optional(),
        CalcField.NotNegative("u_r_ohm", "standard uncertainty of the resistance, ohm; 0 where missing").Optional(),
        CalcField.NotNegative("u_cal_k", "standard uncertainty of the calibration, kelvin; 0 where missing").Optional(),
        CalcField.Positive("r0_ohm", "resistance at 0 degC, ohm; 100 where missing").Optional(),
        CalcField.Positive("a", "coefficient A, 1/degC; of IEC 60751 where missing").Optional(),
        CalcField.Number("b", "coefficient B, 1/degC^2; of IEC 60751 where missing").Optional(),
        CalcField.Number("c", "coefficient C, 1/degC^4; of IEC 60751 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("t_c", "temperature t90, degree Celsius"),
        ("u_t_k", "its standard uncertainty, kelvin; null outside the range"),
        ("r_ohm", "resistance, ohm"),
        ("dt_dr_k_per_ohm", "sensitivity, kelvin per ohm"),
        ("in_range", "whether the temperature lies in the range of the standard, -200 to 850 degC"),
    ];

    public override string Example => """{ "r_ohm": 138.5055, "u_r_ohm": 0.001, "u_cal_k": 0.005 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (input.Has("r_ohm") == input.Has("t_c"))
        {
            input.Reject("one-of", string.Empty, "Exactly one of r_ohm and t_c is needed.", "Give r_ohm for a temperature, t_c for a resistance.");
            return;
        }

        CallendarVanDusen nominal = CallendarVanDusen.Nominal(input.Number("r0_ohm", 100));
        CallendarVanDusen prt = new(nominal.R0Ohm, input.Number("a", nominal.A), input.Number("b", nominal.B), input.Number("c", nominal.C));
        double ohm = input.Has("r_ohm") ? input.Number("r_ohm") : prt.ResistanceOhm(input.Number("t_c"));
        TemperatureEvaluation bare = prt.Evaluate(ohm, 0);
        double fromOhm = input.Number("u_r_ohm", 0) * Math.Abs(bare.Sensitivity);
        TemperatureEvaluation evaluation = prt.Evaluate(ohm, double.Hypot(fromOhm, input.Number("u_cal_k", 0)));
        result.Add("t_c", "u_t_k", evaluation.Celsius)
            .Add("r_ohm", ohm)
            .Add("dt_dr_k_per_ohm", evaluation.Sensitivity)
            .Add("in_range", evaluation.InRange)
            .Step("r_over_r0", ohm / prt.R0Ohm)
            .Step("dr_dt_ohm_per_k", 1 / evaluation.Sensitivity)
            .Step("u_from_r_k", fromOhm);
    }
}
