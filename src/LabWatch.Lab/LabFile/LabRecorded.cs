namespace LabWatch.Lab.LabFile;

/// <summary>What a document in force says about the records that it was put together from.</summary>
/// <param name="Sequence">Number of the newest revision in it.</param>
/// <param name="ImportDigest">SHA-256 (small hexadecimal digits) of the lab file that was imported last; null where none was.</param>
public sealed record LabRecorded(long Sequence, string? ImportDigest);
