using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Service.Calc;

/// <summary>Sakuma-Hattori equation: fit, temperature from signal, signal from temperature.</summary>
internal sealed class RadiationThermometerCalculator : Calculator
{
    public override string Name => "radiation-thermometer";

    public override string Summary => "Temperature from the signal of a radiation thermometer, signal from temperature, or the parameters from calibration points.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "S(T) = C / (exp(c2 / (A T + B)) - 1); T = (c2 / ln(C/S + 1) - B) / A",
        "fit: exact through three points, least squares in temperature through more",
        "u(t)^2 = (u(S) dt/dS)^2 + u_cal^2",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "F. Sakuma and S. Hattori (1982); P. Saunders, CCT-WG5 (2008); ASTM E2847",
        "c2 = 0.014388 m K above the silver point: Preston-Thomas 1990, equation 15",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Positive("a_um", "A, micrometre; with points the value to start from").Optional(),
        CalcField.Number("b_um_k", "B, micrometre kelvin; 0 where missing").Optional(),
        CalcField.Positive("c", "C, in the unit of the signal; 1 where missing").Optional(),
        CalcField.Objects(
            "points",
            "calibration points to fit A, B, C to, at least three",
            CalcField.Celsius("t_c", "temperature, degree Celsius"),
            CalcField.Positive("signal", "signal")) with { Required = false, MinimumItems = 3, MaximumItems = 1000 },
        CalcField.Positive("c2_m_k", "second radiation constant, m K; 0.014388 (ITS-90) where missing").Optional(),
        CalcField.Positive("signal", "signal in the unit of C").Optional(),
        CalcField.Celsius("t_c", "temperature, degree Celsius").Optional(),
        CalcField.NotNegative("u_signal", "standard uncertainty of the signal; 0 where missing").Optional(),
        CalcField.NotNegative("u_cal_k", "standard uncertainty of the calibration, kelvin; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("a_um", "A, micrometre"),
        ("b_um_k", "B, micrometre kelvin"),
        ("c", "C, unit of the signal"),
        ("rms_k", "root mean square of the fit's residuals, kelvin; with points only"),
        ("t_c", "temperature, degree Celsius"),
        ("u_t_k", "its standard uncertainty, kelvin"),
        ("signal", "signal"),
        ("dt_ds_k_per_unit", "sensitivity, kelvin per unit of the signal"),
    ];

    public override string Example => """{ "a_um": 0.9, "b_um_k": 2.1, "c": 1e-6, "signal": 1.2e-12, "u_signal": 1e-15, "u_cal_k": 0.2 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (!input.Has("a_um") || (input.Has("signal") && input.Has("t_c")) || !(input.Has("signal") || input.Has("t_c") || input.Has("points")))
        {
            input.Reject("one-of", string.Empty, "a_um is needed, and one of signal, t_c and points.", "See --example.");
            return;
        }

        double c2 = input.Number("c2_m_k", RadiationConstants.SecondOfIts90);
        SakumaHattori equation = new(input.Number("a_um"), input.Number("b_um_k", 0), input.Number("c", 1), c2);
        IReadOnlyList<CalcInput> points = input.Objects("points");
        if (points.Count > 0)
        {
            double[] kelvin = [.. points.Select(point => point.Number("t_c") + Its90.CelsiusOffset)];
            SakumaHattoriFit fit = SakumaHattoriFit.To(kelvin, [.. points.Select(point => point.Number("signal"))], equation.AMicrometre, c2);
            if (!fit.Converged)
            {
                input.Reject("no-fit", "points", "No equation of this form goes through these points.", "Check the points and the a_um to start from.");
                return;
            }

            equation = fit.Characteristic;
            result.Add("rms_k", fit.RmsKelvin);
        }

        result.Add("a_um", equation.AMicrometre).Add("b_um_k", equation.BMicrometreKelvin).Add("c", equation.C);
        if (input.Has("signal") || input.Has("t_c"))
        {
            AddEvaluation(input, equation, result);
        }
    }

    private static void AddEvaluation(CalcInput input, SakumaHattori equation, CalcResult result)
    {
        double signal = input.Has("signal") ? input.Number("signal") : equation.Signal(input.Number("t_c") + Its90.CelsiusOffset);
        TemperatureEvaluation bare = equation.Evaluate(signal, 0);
        double fromSignal = bare.Sensitivity * input.Number("u_signal", 0);
        TemperatureEvaluation evaluation = equation.Evaluate(signal, double.Hypot(fromSignal, input.Number("u_cal_k", 0)));
        result.Add("t_c", "u_t_k", evaluation.Celsius)
            .Add("signal", signal)
            .Add("dt_ds_k_per_unit", evaluation.Sensitivity)
            .Step("signal_over_c", signal / equation.C)
            .Step("u_from_signal_k", fromSignal);
    }
}
