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

    /// <summary>
    /// Whether it turns readings into temperatures, so that another certificate in force makes another result. False where it looks at raw readings alone.
    /// </summary>
    bool RestsOnCertificates => true;

    /// <summary>
    /// The working band that a scope of a source is about, so that the limit of that band goes before one for all bands; null where a scope is about none.
    /// A scope is empty, the id of a working band, or the id of a channel of the source.
    /// </summary>
    string? BandOf(ReferenceSource source, string scope) => null;

    /// <summary>
    /// Judges one window: one result a scope, at least one. Called only for windows in which some needed channel has a reading. Which scopes
    /// there are follows from the source alone, never from the readings: a scope about which nothing can be said is not decided. The limit is
    /// looked up by the side result <see cref="FigureName.SetPoint"/> (else <see cref="FigureName.Mean"/>) where there is one, the band of
    /// the scope, and the end of the window; whoever looks later whether another limit is in force goes by the same.
    /// </summary>
    IReadOnlyList<CriterionResult> Evaluate(CriterionInput input);
}
