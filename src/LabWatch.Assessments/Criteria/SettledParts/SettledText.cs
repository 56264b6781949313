using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.SettledParts;

/// <summary>An assessment of rest in numbers and plain words.</summary>
internal static class SettledText
{
    public static IReadOnlyList<AssessmentFigure> Figures(StabilityEvidence evidence, RestState state, SettledVerdict verdict)
    {
        List<AssessmentFigure> figures = [];
        if (double.IsFinite(evidence.SetPoint.Celsius))
        {
            figures.Add(new(FigureName.SetPoint, new(evidence.SetPoint.Celsius, 0), "Cel"));
        }

        figures.Add(new(FigureName.Slope, state.Trend.SlopePerHour, "K/h"));
        figures.Add(new(FigureName.ReadingCount, new(evidence.Within.Count, 0), "/"));
        if (state.Trend.SlopePerHour.HasValue)
        {
            figures.Add(new(FigureName.Mean, new(evidence.Within.MeanCelsius, double.Hypot(state.Trend.Mean.StandardUncertainty, evidence.Within.StandardUncertainty)), "Cel"));
            figures.Add(new("distance", new(state.DistanceKelvin, state.Trend.Mean.StandardUncertainty), "K"));
            figures.Add(new("effective-sample-size", new(state.Trend.EffectiveSampleSize, 0), "/"));
            figures.Add(new("thinned-to", new(state.ThinnedTo.TotalSeconds, 0), "s"));
        }

        if (double.IsFinite(state.Ratio))
        {
            figures.Add(new("r-statistic", new(state.Ratio, 0), "/"));
            figures.Add(new("r-critical", new(state.Critical, 0), "/"));
        }

        if (verdict.Forecast is { } forecast)
        {
            figures.Add(new("time-constant", new(forecast.TimeConstant.TotalMinutes, 0), "min"));
            figures.Add(new("settles-earliest", new(forecast.Earliest.TotalMinutes, 0), "min"));
            figures.Add(new("settles-latest", new(forecast.Latest.TotalMinutes, 0), "min"));
        }

        if (verdict.Limit.Obstacles.Count == 0)
        {
            figures.Add(new(FigureName.GuardBand, new(verdict.Limit.Conformity.GuardBand, 0), verdict.Limit.Unit));
        }

        return figures;
    }

    public static string Of(StabilityEvidence evidence, RestState state, SettledVerdict verdict)
    {
        LimitVerdict limit = verdict.Limit;
        string refusal = VerdictText.Refusal(limit.Obstacles);
        if (!limit.Value.HasValue)
        {
            return $"{refusal}There are too few temperatures of {evidence.Reference.Id} in the window.";
        }

        string sentence = VerdictText.Sentence(
            $"Slope over {Quantities.Duration(evidence.Schedule.Window)}", limit.Value.Value, limit.Unit, limit.Limit, limit.Conformity, limit.Obstacles.Count == 0);
        Estimate slope = state.Trend.SlopePerHour;
        string direction = slope.Value >= 0 ? "up" : "down";
        string steady = double.IsNaN(state.Ratio)
            ? string.Empty
            : $" The R-statistic of {Quantities.Count(state.Thinned)} readings {Quantities.Duration(state.ThinnedTo)} apart is {Quantities.Fixed(state.Ratio, 2)}; a steady source stays below {Quantities.Fixed(state.Critical, 2)} in 99 % of cases.";
        return $"{refusal}{sentence} It goes {direction}; the mean is {Quantities.Fixed(evidence.Within.MeanCelsius, 3)} degC, {Quantities.Significant(Math.Abs(state.DistanceKelvin))} K from the set point of "
            + $"{VerdictText.Plain(evidence.SetPoint.Celsius)} degC (within {Quantities.Significant(state.ToleranceKelvin)} K is at it).{steady}";
    }
}
