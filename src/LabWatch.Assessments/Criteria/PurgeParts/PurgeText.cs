using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;

namespace LabWatch.Assessments.Criteria.PurgeParts;

/// <summary>An assessment of the purge in numbers and plain words.</summary>
internal static class PurgeText
{
    public static IReadOnlyList<AssessmentFigure> Figures(PurgeRecord record)
    {
        if (record.Worst is not { } worst)
        {
            return [new("moment-count", new(0, 0), "/")];
        }

        List<AssessmentFigure> figures = [new("coldest-wall", worst.Wall, "Cel"), new("dew-point", worst.Gas, "Cel"), new("dew-point-excess", new(worst.ExcessKelvin, double.Hypot(worst.Wall.StandardUncertainty, worst.Gas.StandardUncertainty)), "K")];
        double flow = record.Within.OfType<PurgeMoment>().Select(moment => moment.FlowLitrePerMinute).Where(double.IsFinite).DefaultIfEmpty(double.NaN).Min();
        if (double.IsFinite(flow))
        {
            figures.Add(new("least-flow", new(flow, 0), "l/min"));
        }

        return figures;
    }

    public static string Of(PurgeRecord record, LimitVerdict verdict, bool fails)
    {
        string breach = record.Breaches.Count == 0 ? string.Empty : (fails ? "Fails: " : "To be seen to: ") + string.Join("; and ", record.Breaches) + ". ";
        string refusal = fails ? string.Empty : VerdictText.Refusal(verdict.Obstacles);
        if (record.Worst is not { } worst)
        {
            return refusal + breach + "Nothing is known of the gas at the aperture in the window.";
        }

        string sentence = VerdictText.Sentence(
            "Relative humidity of the gas at the coldest wall", verdict.Value.Value, verdict.Unit, verdict.Limit, verdict.Conformity, verdict.Obstacles.Count == 0 && !fails);
        double wall = 2 * worst.Wall.StandardUncertainty, gas = 2 * worst.Gas.StandardUncertainty;
        return $"{refusal}{breach}{sentence} Coldest is {worst.WallChannel} with {Quantities.Value(worst.Wall.Value, wall)} degC (U = {Quantities.Significant(wall)} K, k = 2); "
            + $"the dew or frost point is {Quantities.Value(worst.Gas.Value, gas)} degC (U = {Quantities.Significant(gas)} K, k = 2) by {worst.GasFrom}, "
            + $"{Quantities.Significant(Math.Abs(worst.ExcessKelvin))} K {(worst.ExcessKelvin < 0 ? "below" : "above")} it.";
    }
}
