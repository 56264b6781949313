namespace LabWatch.Service.Api.Views;

/// <summary>The end of a site's audit chain.</summary>
/// <param name="Sequence">Number of the last entry.</param>
/// <param name="Digest">Its digest.</param>
internal sealed record AuditHeadView(long Sequence, string Digest);
