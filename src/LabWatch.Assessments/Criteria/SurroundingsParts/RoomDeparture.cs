using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.SurroundingsParts;

/// <summary>How far one condition went from the middle of its permitted range in a window.</summary>
/// <param name="Condition">The condition.</param>
/// <param name="Permitted">Its range.</param>
/// <param name="Extreme">The 5 min mean farthest from the middle, in the unit of the condition; none where there is none.</param>
/// <param name="Percent">Its distance, percent of half of the range's width.</param>
/// <param name="Obstacle">Why it is not known, as a clause; null where it is.</param>
internal sealed record RoomDeparture(RoomCondition Condition, PermittedRange Permitted, Estimate Extreme, Estimate Percent, string? Obstacle)
{
    private const double PascalPerHectopascal = 100;
    private static readonly TimeSpan Block = TimeSpan.FromMinutes(5);

    public static IReadOnlyList<RoomDeparture> Of(CriterionInput input) =>
        [.. RoomCondition.All
            .Select(condition => (Condition: condition, Permitted: condition.Permitted(input.Source)))
            .Where(pair => pair.Permitted is not null)
            .Select(pair => Of(input, pair.Condition, pair.Permitted!.Value))];

    public IEnumerable<AssessmentFigure> Figures()
    {
        if (Extreme.HasValue)
        {
            yield return new(Condition.Figure, Extreme, Condition.Unit);
            yield return new(Condition.Figure + "-part", Percent, "%");
        }
    }

    public static string Text(IReadOnlyList<RoomDeparture> departures, RoomDeparture? worst, LimitVerdict verdict)
    {
        string refusal = VerdictText.Refusal(verdict.Obstacles);
        if (worst is null)
        {
            return refusal + "No condition of the room has a reading in the window.";
        }

        string sentence = VerdictText.Sentence(
            $"The largest departure of the room ({worst.Condition.Name}) from the middle of its permitted range, in parts of half its width,", verdict.Value.Value, verdict.Unit, verdict.Limit,
            verdict.Conformity, verdict.Obstacles.Count == 0);
        return $"{refusal}{sentence} {string.Join(' ', departures.Where(departure => departure.Extreme.HasValue).Select(Sentence))}";
    }

    private static string Sentence(RoomDeparture departure)
    {
        RoomCondition condition = departure.Condition;
        double expanded = 2 * departure.Extreme.StandardUncertainty;
        return $"{char.ToUpperInvariant(condition.Name[0])}{condition.Name[1..]}: farthest {Quantities.Value(departure.Extreme.Value, expanded)} {condition.Spelt} "
            + $"(U = {Quantities.Significant(expanded)} {(condition.Unit == "Cel" ? "K" : condition.Spelt)}, k = 2), permitted {VerdictText.Plain(departure.Permitted.Minimum)} to {VerdictText.Plain(departure.Permitted.Maximum)} {condition.Spelt}.";
    }

    private static RoomDeparture Of(CriterionInput input, RoomCondition condition, PermittedRange permitted)
    {
        if (condition.ChannelOf(input.Source) is not { } channel)
        {
            return Unknown(condition, permitted, $"nothing measures the {condition.Name}, for which a range is stated");
        }

        BlockMeans blocks = BlockMeans.Of(input.Snapshot, channel, input.Window, Block, input.Readings);
        double factor = channel.Unit == "hPa" ? PascalPerHectopascal : 1;
        double[] means = [.. blocks.Means.Where(double.IsFinite).Select(mean => mean * factor)];
        if (means.Length < blocks.Means.Length * 0.8)
        {
            return Unknown(condition, permitted, $"{channel.Id} has readings in {Quantities.Count(means.Length)} of {Quantities.Count(blocks.Means.Length)} parts of the window");
        }

        double extreme = means.MaxBy(mean => Math.Abs(mean - permitted.Centre));
        double u = double.IsFinite(blocks.Calibration) ? blocks.Calibration : condition.Uncalibrated;
        return new(
            condition, permitted, new(extreme, u), new(100 * Math.Abs(extreme - permitted.Centre) / permitted.HalfWidth, 100 * u / permitted.HalfWidth), null);
    }

    private static RoomDeparture Unknown(RoomCondition condition, PermittedRange permitted, string obstacle) =>
        new(condition, permitted, Estimate.None, Estimate.None, obstacle);
}
