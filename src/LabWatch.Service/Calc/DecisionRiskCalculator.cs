using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Global risks of a decision rule.</summary>
internal sealed class DecisionRiskCalculator : Calculator
{
    public override string Name => "decision-risk";

    public override string Summary => "Risk of accepting what does not conform and of rejecting what does, before measuring, for a normal process and a normal measurement.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "consumer: integral of the process density outside the tolerance times the probability of a measured value inside the acceptance limits",
        "producer: integral of the process density inside the tolerance times the probability of a measured value outside the acceptance limits",
        "acceptance limits = tolerance limits moved inwards by the guard band",
    ];

    public override IReadOnlyList<string> Source { get; } = ["JCGM 106:2012, 9.5, equations 17 to 19"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("process_mean", "mean of the values that are met"),
        CalcField.Positive("process_deviation", "their standard deviation"),
        CalcField.Positive("u", "standard uncertainty of a measurement"),
        CalcField.Number("lower", "lower tolerance limit; open where missing").Optional(),
        CalcField.Number("upper", "upper tolerance limit; open where missing").Optional(),
        CalcField.Number("guard_band", "distance of the acceptance limits inside the tolerance limits; negative for outside; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("consumer_risk", "probability that an item does not conform and is accepted"),
        ("producer_risk", "probability that an item conforms and is rejected"),
        ("acceptance_lower", "lower acceptance limit; null where open"),
        ("acceptance_upper", "upper acceptance limit; null where open"),
    ];

    public override string Example => """{ "process_mean": 0, "process_deviation": 12, "u": 4, "lower": -30, "upper": 30, "guard_band": 8 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        ToleranceInterval tolerance = new(input.Number("lower", double.NegativeInfinity), input.Number("upper", double.PositiveInfinity));
        ToleranceInterval acceptance = tolerance.Guarded(input.Number("guard_band", 0));
        if ((!input.Has("lower") && !input.Has("upper")) || !(tolerance.Lower < tolerance.Upper) || !(acceptance.Lower < acceptance.Upper))
        {
            input.Reject("empty-range", string.Empty, "Nothing lies inside of the limits.", "Give lower, upper or both, upper above lower, and a guard band that leaves room.");
            return;
        }

        Estimate process = new(input.Number("process_mean"), input.Number("process_deviation"));
        double u = input.Number("u");
        result.Add("consumer_risk", GlobalRisk.Consumer(process, u, tolerance, acceptance))
            .Add("producer_risk", GlobalRisk.Producer(process, u, tolerance, acceptance))
            .Add("acceptance_lower", acceptance.Lower)
            .Add("acceptance_upper", acceptance.Upper);
    }
}
