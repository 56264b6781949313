namespace LabWatch.Records.Audit;

/// <summary>The end of a site's audit chain. Written down elsewhere, it shows later whether the chain was cut or written anew.</summary>
/// <param name="Sequence">Number of the last entry.</param>
/// <param name="Digest">Its digest, 64 small hexadecimal digits.</param>
public sealed record AuditHead(long Sequence, string Digest);
