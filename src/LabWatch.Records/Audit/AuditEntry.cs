using System.Text.Json.Nodes;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Audit;

/// <summary>One entry of a site's audit trail.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Sequence">1 for the site's first entry, one more for each later one, without gaps.</param>
/// <param name="At">When it happened.</param>
/// <param name="Actor">Account name of the person; <c>labwatch</c> for the service itself.</param>
/// <param name="Action">What was done, a slug.</param>
/// <param name="Subject">What it was done to, as <c>kind/id</c>.</param>
/// <param name="Content">The facts in few words.</param>
/// <param name="RecordDigest">SHA-256 (hexadecimal) of the covered record's canonical form; null where it covers none.</param>
/// <param name="Previous">Digest of the entry before; 64 zeros in the first.</param>
/// <param name="Digest">SHA-256 (hexadecimal) of this entry's canonical form.</param>
public sealed record AuditEntry(
    string Site,
    long Sequence,
    Instant At,
    string Actor,
    string Action,
    string Subject,
    JsonObject Content,
    string? RecordDigest,
    string Previous,
    string Digest);
