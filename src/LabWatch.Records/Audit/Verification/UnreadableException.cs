namespace LabWatch.Records.Audit.Verification;

/// <summary>A table cannot be read on: a page is damaged, or the table is not there.</summary>
internal sealed class UnreadableException(string message) : Exception(message);
