using LabWatch.Lab.Findings;
using LabWatch.Records.LabFiles;

namespace LabWatch.Records.Revisions;

/// <summary>What became of an import.</summary>
/// <param name="Plan">What it came to.</param>
/// <param name="Refused">Why it was not done; empty where it was, or where it was only to be looked at.</param>
/// <param name="Import">The import on record; null where none was made.</param>
/// <param name="Records">The site's records afterwards; null where the import was refused or only looked at.</param>
public sealed record LabImportOutcome(LabImportPlan Plan, IReadOnlyList<Finding> Refused, LabImport? Import, LabRecordSet? Records);
