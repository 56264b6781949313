using System.Text.Json.Nodes;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>
/// One entry of the audit trail. Without its digest, and written in canonical form (RFC 8785), it is the text that the digest is of.
/// </summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Sequence">1 for the first entry of the site, one more for each later one.</param>
/// <param name="At">When it happened.</param>
/// <param name="Actor">Account name of the person; <c>labwatch</c> for the service itself.</param>
/// <param name="Action">What was done.</param>
/// <param name="Subject">What it was done to, as <c>kind/id</c>.</param>
/// <param name="Content">The facts in few words.</param>
/// <param name="RecordDigest">SHA-256 of the covered record; null where the entry covers none.</param>
/// <param name="Previous">Digest of the entry before; zeros in the first.</param>
/// <param name="Digest">SHA-256 of this entry.</param>
internal sealed record AuditEntryView(
    string Site, long Sequence, Instant At, string Actor, string Action, string Subject, JsonObject Content, string? RecordDigest, string Previous, string Digest);
