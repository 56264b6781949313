using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One source with its instruments, limits and newest assessments.</summary>
internal sealed record SourceDetailView(
    [property: Description("The source and what is known about it now.")] SourceView Source,
    [property: Description("Instruments installed now.")] IReadOnlyList<InstallationView> Instruments,
    [property: Description("Acceptance limits in force now.")] IReadOnlyList<LimitView> Limits,
    [property: Description("The newest assessment of each criterion and scope.")] IReadOnlyList<AssessmentView> Assessments);
