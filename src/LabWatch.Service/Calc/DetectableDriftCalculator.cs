using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>What a schedule of checks would miss.</summary>
internal sealed class DetectableDriftCalculator : Calculator
{
    public override string Name => "detectable-drift";

    public override string Summary => "The smallest lasting shift that a number of checks finds, by formula and by simulation.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "limits of the mean of n checks: z(alpha/2) u/sqrt(n), alpha = false alarms a year/(checks a year x bands)",
        "smallest shift = (z(alpha/2) + z(power)) u/sqrt(n)",
        "simulation: the moving mean check by check, which may signal at any of the n; 100 000 trials, seeded",
    ];

    public override IReadOnlyList<string> Source { get; } = ["normal theory of control charts (ISO 7870-1); schedule and power: common practice, no source"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Positive("u_check", "standard uncertainty of one check without what all checks share, any unit"),
        CalcField.Integer("checks", "number of checks since the shift", 1, 1000),
        CalcField.Positive("checks_per_year", "checks of one band a year; 250 where missing").Optional() with { Maximum = 1e6 },
        CalcField.Positive("false_alarms_per_year", "false alarms a year on the source; 0.1 where missing").Optional() with { Maximum = 100 },
        CalcField.Integer("bands", "bands checked; 1 where missing", 1, 100).Optional(),
        CalcField.Number("power", "probability to find the shift; 0.95 where missing").Optional() with { Minimum = 0.5, Maximum = 0.9999 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("drift", "smallest shift by the formula, unit of u_check"),
        ("drift_simulated", "the same by simulation"),
        ("limit_of_mean", "limits of the mean, unit of u_check"),
    ];

    public override string Example => """{ "u_check": 0.05, "checks": 5, "bands": 2 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        var drift = new DetectableDrift(
            input.Number("u_check"),
            input.Number("checks_per_year", 250),
            input.Number("false_alarms_per_year", 0.1),
            (int)input.Integer("bands", 1),
            input.Number("power", 0.95));
        if (!(drift.FalseAlarmsPerYear < drift.ChecksPerYear * drift.Bands))
        {
            input.Reject("too-many-alarms", "false_alarms_per_year", "There would be an alarm at every check.", "Ask for fewer false alarms or give more checks.");
            return;
        }

        int checks = (int)input.Integer("checks");
        result.Add("drift", drift.ByFormula(checks))
            .Add("drift_simulated", drift.BySimulation(checks))
            .Add("limit_of_mean", drift.Limit * drift.CheckUncertainty / Math.Sqrt(checks))
            .Step("z_of_limits", drift.Limit);
    }
}
