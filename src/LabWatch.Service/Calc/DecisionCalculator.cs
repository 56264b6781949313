using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Decisions on conformity.</summary>
internal sealed class DecisionCalculator : Calculator
{
    public override string Name => "decision";

    public override string Summary => "Decision on a value against a limit, with guard band and probability of conformity.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "guard band w = r U, U = k u; pass inside the limit less w, conditional pass inside the limit, conditional fail within w outside, fail beyond",
        "probability of conformity = F((upper - y)/u) - F((lower - y)/u), F normal, or Student's t with finite degrees of freedom",
    ];

    public override IReadOnlyList<string> Source { get; } =
        ["ILAC-G8:09/2019, 4.2.1 and 4.2.3", "JCGM 106:2012, 7.2 to 7.4 and 8.3.2", "JCGM 100:2008, table G.2"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("value", "measured value"),
        CalcField.NotNegative("u", "its standard uncertainty"),
        CalcField.Positive("dof", "degrees of freedom; infinite where missing").Optional(),
        CalcField.Number("lower", "lower limit; open where missing").Optional(),
        CalcField.Number("upper", "upper limit; open where missing").Optional(),
        CalcField.Choice("rule", "decision rule; guard-band where missing", Slugged<DecisionRule>.Names).Optional(),
        CalcField.NotNegative("r", "multiple of U that makes the guard band; 1 where missing").Optional() with { Maximum = 10 },
        CalcField.Positive("coverage_probability", "coverage probability of U; 0.9545 (two sigma) where missing").Optional() with { Maximum = 0.9999 },
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("decision", "pass, conditional-pass, conditional-fail, fail or not-decided"),
        ("conformity_probability", "probability that the true value conforms"),
        ("nonconformity_probability", "one minus that, with full accuracy where it is small"),
        ("k", "coverage factor"),
        ("expanded_u", "expanded uncertainty U"),
        ("guard_band", "width of the guard band"),
        ("acceptance_lower", "lower acceptance limit; null where open"),
        ("acceptance_upper", "upper acceptance limit; null where open"),
    ];

    public override string Example => """{ "value": 0.42, "u": 0.05, "upper": 0.5, "rule": "guard-band" }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        ToleranceInterval tolerance = new(input.Number("lower", double.NegativeInfinity), input.Number("upper", double.PositiveInfinity));
        if ((!input.Has("lower") && !input.Has("upper")) || tolerance.Upper < tolerance.Lower)
        {
            input.Reject("empty-range", string.Empty, "lower, upper or both are needed, upper not below lower.", "Give a limit.");
            return;
        }

        Estimate value = new(input.Number("value"), input.Number("u"), input.Number("dof", double.PositiveInfinity));
        ConformityResult conformity = Conformity.Decide(
            value,
            tolerance,
            Slugged<DecisionRule>.Parse(input.Text("rule", "guard-band")),
            input.Number("r", 1),
            input.Number("coverage_probability", CoverageFactor.DefaultProbability));
        ToleranceInterval acceptance = tolerance.Guarded(conformity.GuardBand);
        result.Add("decision", Slugged<Decision>.Of(conformity.Decision))
            .Add("conformity_probability", conformity.Probability)
            .Add("nonconformity_probability", Conformity.NonconformityProbability(value, tolerance))
            .Add("k", conformity.CoverageFactor)
            .Add("expanded_u", conformity.ExpandedUncertainty)
            .Add("guard_band", conformity.GuardBand)
            .Add("acceptance_lower", acceptance.Lower)
            .Add("acceptance_upper", acceptance.Upper)
            .Step("distance_to_lower_in_u", (value.Value - tolerance.Lower) / value.StandardUncertainty)
            .Step("distance_to_upper_in_u", (tolerance.Upper - value.Value) / value.StandardUncertainty);
    }
}
