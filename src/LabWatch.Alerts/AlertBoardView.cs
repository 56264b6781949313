using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts;

/// <summary>The open alerts at one moment.</summary>
/// <param name="Sequence">Number of the last change that is in it; later changes have higher numbers. Starts anew with the process.</param>
/// <param name="Open">Open alerts, newest raised first.</param>
public sealed record AlertBoardView(long Sequence, IReadOnlyList<Alert> Open);
