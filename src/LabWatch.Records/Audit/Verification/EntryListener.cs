namespace LabWatch.Records.Audit.Verification;

/// <summary>Is told of an entry: every one that covers a record, of the others those whose digest is right.</summary>
/// <param name="place">Place of the entry among the facts.</param>
/// <param name="subject">Its subject.</param>
/// <param name="content">Its content, JSON.</param>
internal delegate void EntryListener(int place, ReadOnlySpan<byte> subject, ReadOnlySpan<byte> content);
