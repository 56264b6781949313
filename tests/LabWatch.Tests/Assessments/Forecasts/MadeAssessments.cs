using LabWatch.Assessments;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Assessments.Forecasts;

/// <summary>Assessments as they stand on record, made by hand.</summary>
internal static class MadeAssessments
{
    public static readonly SourceKey Source = new("hollin-vale", "hazel");

    public static readonly Instant FirstDay = new(1_790_000_000_000_000 - (1_790_000_000_000_000 % 86_400_000_000));

    public static Assessment Stability(double day, double millikelvin, double limit = 10, string certificate = "cert@1", double setPoint = 37, Decision decision = Decision.Pass) => Make(
        CriterionCode.Stability, string.Empty, day, new(millikelvin, 0.1), "mK", limit, [new(FigureName.SetPoint, new(setPoint, 0), "Cel")], certificate, decision);

    public static Assessment Emissivity(double day, double emissivity, double baseline = 0.9990, double limit = 0.004) => Make(
        CriterionCode.EffectiveEmissivity, "lwir", day, new(Math.Abs(emissivity - baseline), 1e-4), "/", limit,
        [
            new(FigureName.SetPoint, new(37, 0), "Cel"),
            new(FigureName.Mean, new(37.002, 0.01), "Cel"),
            new("effective-emissivity", new(emissivity, 1e-4), "/"),
            new("baseline-emissivity", new(baseline, 1e-4), "/"),
            new("radiance-temperature-offset", new(1000 * (emissivity - 1), 1), "mK"),
            new("surroundings", new(23, 1), "Cel"),
        ],
        "cert@1",
        Decision.Pass);

    private static Assessment Make(
        string criterion, string scope, double day, Estimate value, string unit, double limit, IReadOnlyList<AssessmentFigure> figures, string certificate, Decision decision)
    {
        Instant end = FirstDay + TimeSpan.FromDays(day) + TimeSpan.FromHours(12);
        return new(
            Source, criterion, scope, new TimeWindow(end - TimeSpan.FromMinutes(30), end), 1, value, unit, limit, 2, decision, 1, figures, string.Empty,
            new Provenance("digest", [], [certificate], "limit@1", "test"), end, null);
    }
}
