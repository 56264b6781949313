using LabWatch.Lab.Sources;

namespace LabWatch.Assessments;

/// <summary>
/// One way to judge a source. Evaluation is pure: it sees only its input, so that the same input gives the same result at any time.
/// To add a criterion, write one file that implements this and register it.
/// </summary>
public interface ICriterion
{
    /// <summary>Code of the criterion, one of <see cref="Lab.Limits.CriterionCode"/>.</summary>
    string Code { get; }

    /// <summary>Which windows it looks at.</summary>
    CriterionSchedule Schedule { get; }

    /// <summary>Ids of the channels whose raw readings it needs; empty where it does not apply to a source.</summary>
    IReadOnlyList<string> Channels(ReferenceSource source);

    /// <summary>Judges one window: one result a scope, at least one. Called only for windows in which some needed channel has a reading.</summary>
    IReadOnlyList<CriterionResult> Evaluate(CriterionInput input);
}
