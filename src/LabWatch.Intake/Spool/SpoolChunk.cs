namespace LabWatch.Intake.Spool;

/// <summary>One sealed spool file with its entries, to be moved to the store and then removed.</summary>
/// <param name="Path">Path of the file.</param>
/// <param name="Bytes">Its length.</param>
/// <param name="File">Its content.</param>
internal sealed record SpoolChunk(string Path, long Bytes, SpoolFile File);
