using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Readiness;

/// <summary>When a source is expected to be ready, as far as it can be told. An estimate for planning; nothing is decided by it.</summary>
/// <param name="ArrivesEarliest">When it can be at its set point at the earliest; null where that is not known or it is there already.</param>
/// <param name="ArrivesLatest">When it will be at its set point at the latest if it goes on as lately; null as above.</param>
/// <param name="ReadyNotBefore">When the first window that can show its stability will have been judged; null where not known.</param>
public sealed record ReadyForecast(Instant? ArrivesEarliest, Instant? ArrivesLatest, Instant? ReadyNotBefore);
