using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;

namespace LabWatch.Alerts;

/// <summary>What became of an acknowledgement.</summary>
/// <param name="Alert">The alert as it is now; null where there is none of that id, or where there are findings.</param>
/// <param name="Findings">What was wrong with the request; empty where nothing.</param>
public sealed record AcknowledgeResult(Alert? Alert, IReadOnlyList<Finding> Findings);
