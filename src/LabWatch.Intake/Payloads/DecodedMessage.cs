using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;

namespace LabWatch.Intake.Payloads;

/// <summary>What became of one message: the readings that are good and the findings about what is not.</summary>
/// <param name="Pack">The good readings; null where there is none.</param>
/// <param name="Findings">What was refused and why; empty where all is well.</param>
internal readonly record struct DecodedMessage(ReadingPack? Pack, IReadOnlyList<Finding> Findings);
