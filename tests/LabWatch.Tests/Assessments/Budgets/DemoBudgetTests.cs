using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments.Budgets;

/// <summary>The budget on the simulated laboratory and its lab file.</summary>
public sealed class DemoBudgetTests
{
    /// <summary>Monday 2026-11-02T00:00:00Z.</summary>
    private static readonly Instant Monday = Instant.FromUnixSeconds(1_793_577_600);

    private static readonly BudgetCriterion Criterion = new(BudgetCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void Print()
    {
        string[] sources = ["fir", "rowan", "yew", "hazel"];
        DemoRun run = new(5, Monday);
        for (int day = 0; day < 4; day++)
        {
            run.SkipUntil(Monday + TimeSpan.FromHours((24 * day) + 3));
            run.RunUntil(Monday + TimeSpan.FromHours((24 * day) + 17.5), sources);
            foreach (string source in sources)
            {
                for (double hour = 5; hour <= 17.5; hour += 0.5)
                {
                    foreach (CriterionResult result in run.Evaluate(Criterion, source, Monday + TimeSpan.FromHours((24 * day) + hour)))
                    {
                        if (result.Value.HasValue && !result.Explanation.Contains("set point changed", StringComparison.Ordinal) && !result.Explanation.Contains("approaching", StringComparison.Ordinal) && !result.Explanation.Contains("not at its", StringComparison.Ordinal))
                        {
                            string lines = string.Join(" ", result.Figures.Where(f => f.Name.StartsWith("u-", StringComparison.Ordinal) || f.Name.StartsWith("claimed", StringComparison.Ordinal)).Select(f => $"{f.Name}={f.Value.Value:F1}"));
                            File.AppendAllText("/tmp/insight-budget.txt", $"{source} {result.Scope} {CriterionResult.Figure(result.Figures, FigureName.SetPoint)} U={result.Value.Value:F1} {result.Unit} {result.Decision} {lines}\n");
                        }
                    }
                }
            }
        }
    }
}
