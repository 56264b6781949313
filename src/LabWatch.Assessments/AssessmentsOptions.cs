using System.Reflection;
using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Findings;

namespace LabWatch.Assessments;

/// <summary>How assessments are planned.</summary>
public sealed record AssessmentsOptions
{
    /// <summary>How often the planner looks for due windows, 1 s to 10 min. A wake-up that finds none costs next to nothing.</summary>
    public TimeSpan WakeInterval { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>
    /// How long an hour must have been without new readings before late or back-filled readings in it are taken up, 1 s to 1 h: short enough
    /// to be prompt, long enough that a back-fill under way makes no superseded revisions.
    /// </summary>
    public TimeSpan HourQuiet { get; init; } = TimeSpan.FromSeconds(60);

    /// <summary>How many sources are assessed at the same time, 1 to 64.</summary>
    public int Concurrency { get; init; } = 2;

    /// <summary>Windows of the criterion <c>stability</c>.</summary>
    public CriterionSchedule Stability { get; init; } = StabilityCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>data-health</c>.</summary>
    public CriterionSchedule DataHealth { get; init; } = DataHealthCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>axial-uniformity</c>.</summary>
    public CriterionSchedule AxialUniformity { get; init; } = AxialUniformityCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>effective-emissivity</c>.</summary>
    public CriterionSchedule EffectiveEmissivity { get; init; } = EffectiveEmissivityCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>settled</c>.</summary>
    public CriterionSchedule Settled { get; init; } = SettledCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>purge</c>.</summary>
    public CriterionSchedule Purge { get; init; } = PurgeCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>surroundings</c>.</summary>
    public CriterionSchedule Surroundings { get; init; } = SurroundingsCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>traceability</c>.</summary>
    public CriterionSchedule Traceability { get; init; } = TraceabilityCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>heater-balance</c>.</summary>
    public CriterionSchedule HeaterBalance { get; init; } = HeaterBalanceCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>reference-agreement</c>.</summary>
    public CriterionSchedule ReferenceAgreement { get; init; } = ReferenceAgreementCriterion.DefaultSchedule;

    /// <summary>Windows of the criterion <c>budget</c>.</summary>
    public CriterionSchedule Budget { get; init; } = BudgetCriterion.DefaultSchedule;

    /// <summary>Folder in which traces of cavities are kept, so that a start need not trace again; null for memory alone. It can be deleted at any time.</summary>
    public string? TraceDirectory { get; init; }

    /// <summary>Version that provenance names.</summary>
    public string ProgramVersion { get; init; } =
        typeof(AssessmentsOptions).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "unknown";

    /// <summary>Everything that is wrong with the options; empty where they can be used.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        Check(findings, nameof(WakeInterval), WakeInterval, TimeSpan.FromSeconds(1), TimeSpan.FromMinutes(10));
        Check(findings, nameof(HourQuiet), HourQuiet, TimeSpan.FromSeconds(1), TimeSpan.FromHours(1));
        Check(findings, nameof(Stability), Stability, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(DataHealth), DataHealth, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(AxialUniformity), AxialUniformity, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(EffectiveEmissivity), EffectiveEmissivity, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(Settled), Settled, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(Purge), Purge, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(Surroundings), Surroundings, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(Traceability), Traceability, leastLeadIn: TimeSpan.FromMinutes(1));
        Check(findings, nameof(HeaterBalance), HeaterBalance, leastLeadIn: TimeSpan.FromHours(6));
        Check(findings, nameof(ReferenceAgreement), ReferenceAgreement, leastLeadIn: TimeSpan.FromHours(6));
        Check(findings, nameof(Budget), Budget, leastLeadIn: TimeSpan.FromMinutes(1));
        if (Concurrency is < 1 or > 64)
        {
            findings.Add(new Finding(
                "out-of-range", "Assessments:Concurrency", "The number of sources at the same time must be 1 to 64.",
                Concurrency.ToString(System.Globalization.CultureInfo.InvariantCulture), "Use the number of processor cores."));
        }

        return findings;
    }

    private static void Check(List<Finding> findings, string criterion, CriterionSchedule schedule, TimeSpan leastLeadIn)
    {
        Check(findings, $"{criterion}:Window", schedule.Window, TimeSpan.FromMinutes(1), TimeSpan.FromHours(24));
        Check(findings, $"{criterion}:Every", schedule.Every, TimeSpan.FromMinutes(1), schedule.Window);
        Check(findings, $"{criterion}:LeadIn", schedule.LeadIn, leastLeadIn, TimeSpan.FromHours(24));
        Check(findings, $"{criterion}:Grace", schedule.Grace, TimeSpan.Zero, TimeSpan.FromMinutes(10));
    }

    private static void Check(List<Finding> findings, string name, TimeSpan value, TimeSpan least, TimeSpan most)
    {
        if (value < least || value > most)
        {
            findings.Add(new Finding(
                "out-of-range", $"Assessments:{name}", $"The duration must be between {least:c} and {most:c}.", value.ToString("c"), "Leave it out to use the default."));
        }
    }
}
