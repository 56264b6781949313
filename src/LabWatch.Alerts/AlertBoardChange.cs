using LabWatch.Records.Alerts;

namespace LabWatch.Alerts;

/// <summary>One step of one alert, as the board shows it.</summary>
/// <param name="Sequence">Rises by one with each change since the process started.</param>
/// <param name="Transition">The step; its alert is over where the state is normal.</param>
public sealed record AlertBoardChange(long Sequence, AlertTransition Transition);
