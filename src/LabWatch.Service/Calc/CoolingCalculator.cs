using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Cooling of a sensor towards a threshold.</summary>
internal sealed class CoolingCalculator : Calculator
{
    public override string Name => "cooling";

    public override string Summary => "Estimated time until a sensor falls below a threshold, from Newton's law of cooling fitted to its readings. Treat as hot until measured.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "T = T_a + A exp(-t/tau), A and tau by least squares in temperature; time to a threshold T_h: tau ln(A/(T_h - T_a))",
        "interval: scatter of the readings widened for autocorrelation, ambient temperature, and the difference to the fit of the later half",
    ];

    public override IReadOnlyList<string> Source { get; } = ["Newton's law of cooling; least squares and propagation as JCGM 100:2008, 5.1.2 and 5.2.2"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("celsius", "readings in the order of time, degree Celsius") with { MinimumItems = CoolingCurve.MinimumCount, Minimum = -273.15, Maximum = 1e5 },
        .. CalcTimes.Fields,
        CalcField.Celsius("ambient_c", "ambient temperature, degree Celsius"),
        CalcField.NotNegative("u_ambient_k", "its standard uncertainty, kelvin; 0 where missing").Optional(),
        CalcField.Celsius("threshold_c", "threshold, degree Celsius"),
        CalcField.Positive("coverage_probability", "coverage probability of the interval; 0.9545 where missing").Optional() with { Maximum = 0.9999 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("seconds_to_threshold", "time from the last reading until the fitted curve of this sensor is at the threshold; null where nothing can be told"),
        ("u_seconds", "its standard uncertainty"),
        ("earliest_s", "lower end of the interval"),
        ("latest_s", "upper end of the interval: what a person should be told"),
        ("time_constant_s", "fitted time constant"),
        ("u_time_constant_s", "its standard uncertainty"),
        ("residual_k", "root mean square of the differences from the curve, kelvin"),
    ];

    public override string Example =>
        """{ "celsius": [300.0, 290.4, 281.2, 272.3, 263.7, 255.4, 247.4, 239.7, 232.3, 225.2, 218.3, 211.7, 205.3], "step_s": 60, "ambient_c": 23, "u_ambient_k": 1, "threshold_c": 48 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double[] celsius = input.Numbers("celsius");
        if (CalcTimes.Read(input, celsius.Length) is not { } times)
        {
            return;
        }

        CoolingForecast? forecast = CoolingCurve.Forecast(
            [.. times.Select(micros => (micros - times[0]) / 1e6)],
            celsius,
            new Estimate(input.Number("ambient_c"), input.Number("u_ambient_k", 0)),
            input.Number("threshold_c"),
            input.Number("coverage_probability", CoverageFactor.DefaultProbability));
        result.Add("seconds_to_threshold", "u_seconds", forecast?.SecondsToThreshold ?? Estimate.None)
            .Add("earliest_s", forecast?.EarliestSeconds ?? double.NaN)
            .Add("latest_s", forecast?.LatestSeconds ?? double.NaN)
            .Add("time_constant_s", "u_time_constant_s", forecast?.TimeConstantSeconds ?? Estimate.None)
            .Add("residual_k", forecast?.ResidualKelvin ?? double.NaN);
    }
}
