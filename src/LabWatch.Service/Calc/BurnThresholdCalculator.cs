using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Burn thresholds, and when a cooling sensor falls below.</summary>
internal sealed class BurnThresholdCalculator : Calculator
{
    private const string Caution =
        "The thresholds are from memory of the standard and unconfirmed; they are no limits and no permission to touch. This program is no protective"
        + " device: guards, independent over-temperature protection and local rules remain in force, and competent people decide.";

    public override string Name => "burn-threshold";

    public override string Summary => "Burn threshold of a hot surface by material and contact time, and the estimated time until a cooling sensor falls below it.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "lower edge of the band of the standard; between its contact times the value of the next longer one; the laboratory's own limit where lower",
        "cooling: T = T_a + (T_0 - T_a) exp(-t/tau) fitted by least squares; the interval holds scatter with autocorrelation, ambient, and the later half alone",
    ];

    public override IReadOnlyList<string> Source { get; } = ["ISO 13732-1:2006 (values from memory, unconfirmed)", "Newton's law of cooling"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Choice("material", "material of the surface; unknown where missing", Slugged<SurfaceMaterial>.Names).Optional(),
        CalcField.NotNegative("contact_s", "longest contact to reckon with, seconds; up to 10 min where missing").Optional() with { Maximum = 1e6 },
        CalcField.Celsius("laboratory_limit_c", "the laboratory's own limit, degree Celsius").Optional(),
        CalcField.Object(
            "cooling",
            "recent readings of the cooling sensor",
            CalcField.Numbers("time_s", "times, seconds, rising") with { MinimumItems = CoolingCurve.MinimumCount },
            CalcField.Numbers("t_c", "readings, degree Celsius, one a time") with { MinimumItems = CoolingCurve.MinimumCount },
            CalcField.Celsius("ambient_c", "ambient temperature, degree Celsius"),
            CalcField.NotNegative("u_ambient_k", "its standard uncertainty, kelvin; 1 where missing").Optional()).Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("threshold_c", "threshold in use, degree Celsius"),
        ("time_constant_s", "fitted time constant, seconds; with cooling only"),
        ("time_to_threshold_s", "estimated time until this sensor is at the threshold, seconds; null where it cannot be told"),
        ("earliest_s", "lower end of the interval, seconds"),
        ("latest_s", "upper end of the interval, seconds: treat as hot until then, and until measured"),
        ("residual_k", "root mean square of the differences from the curve, kelvin"),
        ("caution", "what this figure is not"),
    ];

    public override string Example => """
        {
          "material": "uncoated-metal",
          "contact_s": 1,
          "cooling": {
            "time_s": [0, 60, 120, 180, 240, 300, 360, 420, 480, 540, 600, 660],
            "t_c": [186.0, 183.3, 180.7, 178.1, 175.5, 173.0, 170.6, 168.1, 165.7, 163.4, 161.0, 158.8],
            "ambient_c": 23
          }
        }
        """;

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        TimeSpan? contact = input.Has("contact_s") ? TimeSpan.FromSeconds(input.Number("contact_s")) : null;
        double? own = input.Has("laboratory_limit_c") ? input.Number("laboratory_limit_c") : null;
        SurfaceMaterial material = Slugged<SurfaceMaterial>.Parse(input.Text("material", "unknown"));
        double threshold = BurnThreshold.Celsius(material, contact, own);
        result.Add("threshold_c", threshold).Step("threshold_of_standard_c", BurnThreshold.Celsius(material, contact));
        if (input.Object("cooling") is { } cooling)
        {
            AddForecast(cooling, threshold, result);
        }

        result.Add("caution", Caution);
    }

    private static void AddForecast(CalcInput input, double threshold, CalcResult result)
    {
        double[] seconds = input.Numbers("time_s");
        double[] celsius = input.Numbers("t_c");
        if (seconds.Length != celsius.Length || seconds.Zip(seconds.Skip(1)).Any(pair => pair.Second <= pair.First))
        {
            input.Reject("not-rising", "time_s", "The times do not rise, or are not as many as the readings.", "Sort them and give one reading a time.");
            return;
        }

        Estimate ambient = new(input.Number("ambient_c"), input.Number("u_ambient_k", 1));
        CoolingForecast? forecast = CoolingCurve.Forecast(seconds, celsius, ambient, threshold);
        result.Add("time_constant_s", forecast?.TimeConstantSeconds.Value ?? double.NaN)
            .Add("time_to_threshold_s", forecast?.SecondsToThreshold.Value ?? double.NaN)
            .Add("earliest_s", forecast?.EarliestSeconds ?? double.NaN)
            .Add("latest_s", forecast?.LatestSeconds ?? double.NaN)
            .Add("residual_k", forecast?.ResidualKelvin ?? double.NaN)
            .Step("u_time_to_threshold_s", forecast?.SecondsToThreshold.StandardUncertainty ?? double.NaN);
    }
}
