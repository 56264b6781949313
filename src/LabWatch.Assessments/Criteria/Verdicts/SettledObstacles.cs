using LabWatch.Assessments.Criteria.StabilityParts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.Verdicts;

/// <summary>Why a source cannot be judged yet at its set point, by the same rules as its stability.</summary>
internal static class SettledObstacles
{
    /// <summary>The set point over window and lead-in, and the reasons, each as a clause.</summary>
    public static (SetPointHistory SetPoint, IReadOnlyList<string> Obstacles) Of(CriterionInput input, CriterionSchedule schedule)
    {
        Channel? channel = StabilityCriterion.SetPointChannel(input.Source);
        if (input.Source.ReferenceChannel is null)
        {
            return (SetPointHistory.Of(channel is null ? null : input.Readings.Find(channel.Id)), []);
        }

        StabilityEvidence evidence = StabilityEvidence.Of(input, schedule);
        AcceptanceLimit? stability = LimitLookup.InForce(
            input.Snapshot, input.Source.Key, CriterionCode.Stability, evidence.NominalCelsius, band: null, input.Window.End);
        return (evidence.SetPoint, [.. StabilityObstacles.SetPoint(evidence), .. evidence.Within.Count > 0 ? StabilityObstacles.Approach(evidence, stability) : []]);
    }
}
