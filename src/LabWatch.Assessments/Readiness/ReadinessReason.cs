namespace LabWatch.Assessments.Readiness;

/// <summary>One thing that a technician has to know about a source's readiness.</summary>
/// <param name="Code">Stable machine name (a slug): a criterion, a hazard, or one of the reader's own such as <c>no-data</c>.</param>
/// <param name="Text">One sentence with numbers and units.</param>
/// <param name="Blocks">Whether it stands against <c>ready</c>; the others inform.</param>
public sealed record ReadinessReason(string Code, string Text, bool Blocks)
{
    /// <summary>Whether it goes away by waiting, as far as is known; of no meaning where it does not block.</summary>
    public bool PassesByWaiting { get; init; }
}
