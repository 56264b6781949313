using LabWatch.Readings.Head;

namespace LabWatch.Readings.Engine;

/// <summary>An hour with unsealed readings, as the policy sees it.</summary>
/// <param name="Hour">The hour.</param>
/// <param name="IsOver">Whether the hour has ended by the wall clock.</param>
/// <param name="Quiet">How long it took no reading.</param>
/// <param name="Readings">Unsealed readings.</param>
/// <param name="FirstChange">Commit of the first of them: the journal is needed from there.</param>
/// <param name="Part">Number of the part that would be sealed.</param>
internal readonly record struct SealCandidate(HeadHour Hour, bool IsOver, TimeSpan Quiet, int Readings, long FirstChange, int Part);
