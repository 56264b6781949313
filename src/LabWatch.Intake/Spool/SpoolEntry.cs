using LabWatch.Lab.Readings;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Intake.Spool;

/// <summary>What one message leaves to be made durable: readings, a refusal, or both.</summary>
/// <param name="Pack">Readings for the store; null where there are none.</param>
/// <param name="Refused">What goes to quarantine; null where nothing was refused.</param>
internal readonly record struct SpoolEntry(ReadingPack? Pack, QuarantinedMessage? Refused);
