using LabWatch.Metrology.Statistics;

namespace LabWatch.Service.Calc;

/// <summary>Allan deviations of a series with gaps.</summary>
internal sealed class AllanCalculator : Calculator
{
    public override string Name => "allan";

    public override string Summary => "Overlapping and modified Allan deviation of evenly spaced values with gaps, at 1, 2, 4, ... spacings.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "overlapping: sigma^2(m) = mean of (ybar_(k+m) - ybar_k)^2/2 over all k, ybar_k the mean of m values from k",
        "modified: the differences are averaged over m neighbours before they are squared",
        "a mean needs four fifths of its values, an average of differences as well",
    ];

    public override IReadOnlyList<string> Source { get; } = ["W. J. Riley, Handbook of Frequency Stability Analysis, NIST SP 1065, 2008, section 5"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Numbers("value", "values in any one unit at one spacing; null for none") with { AllowsGaps = true, MinimumItems = 4 },
        CalcField.Positive("step_s", "spacing of the values, seconds"),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("tau_s", "lengths of the means, seconds"),
        ("deviation", "overlapping Allan deviation at each, unit of the values; null where there is none"),
        ("modified_deviation", "modified Allan deviation at each"),
        ("degrees_of_freedom", "equivalent degrees of freedom of the overlapping deviation for white noise"),
    ];

    public override string Example => """{ "value": [892, 809, 823, 798, 671, 644, 883, 903, 677], "step_s": 1 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        double step = input.Number("step_s");
        IReadOnlyList<(AllanPoint Overlapping, AllanPoint Modified)> points = AllanDeviation.Octaves(input.Numbers("value"));
        result.Add("tau_s", points.Select(point => point.Overlapping.M * step))
            .Add("deviation", points.Select(point => point.Overlapping.Deviation))
            .Add("modified_deviation", points.Select(point => point.Modified.Deviation))
            .Add("degrees_of_freedom", points.Select(point => point.Overlapping.DegreesOfFreedom))
            .Step("differences", points.Select(point => (double)point.Overlapping.Count))
            .Step("modified_differences", points.Select(point => (double)point.Modified.Count));
    }
}
