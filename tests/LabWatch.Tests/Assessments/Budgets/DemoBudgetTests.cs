using LabWatch.Assessments;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Tests.Assessments.Cavities;

namespace LabWatch.Tests.Assessments.Budgets;

/// <summary>The budget on the simulated laboratory and its lab file.</summary>
public sealed class DemoBudgetTests
{
    /// <summary>Thursday 2026-11-05T00:00:00Z.</summary>
    private static readonly Instant Thursday = Instant.FromUnixSeconds(1_793_836_800);

    private static readonly BudgetCriterion Criterion = new(BudgetCriterion.DefaultSchedule, DemoRun.Models);

    [Fact]
    public void On_a_healthy_working_day_the_cmc_of_every_source_and_band_holds()
    {
        string[] sources = ["fir", "rowan", "yew", "hazel"];
        DemoRun run = new(5, Thursday);
        run.SkipUntil(Thursday + TimeSpan.FromHours(6));
        run.RunUntil(Thursday + TimeSpan.FromHours(17.5), sources);
        foreach (string source in sources)
        {
            List<CriterionResult> all = [];
            for (Instant end = Thursday + TimeSpan.FromHours(8); end <= Thursday + TimeSpan.FromHours(17.5); end += TimeSpan.FromMinutes(30))
            {
                all.AddRange(run.Evaluate(Criterion, source, end));
            }

            Assert.All(all.Where(result => result.Decision != Decision.NotDecided), result => Assert.True(result.Decision == Decision.Pass, $"{source}: {result.Explanation}"));
            foreach (string scope in all.Select(result => result.Scope).Distinct())
            {
                Assert.True(all.Any(result => result.Scope == scope && result.Decision == Decision.Pass), $"{source} {scope}: {all.Last(result => result.Scope == scope).Explanation}");
            }
        }
    }
}
