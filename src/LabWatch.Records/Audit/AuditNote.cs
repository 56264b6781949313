using System.Text.Json.Nodes;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Audit;

/// <summary>What is to be entered in the audit trail; its number and its digests are made when it is appended.</summary>
/// <param name="Site">Id of the site whose chain it joins.</param>
/// <param name="At">When it happened.</param>
/// <param name="Actor">Account name of the person; <c>labwatch</c> for the service itself.</param>
/// <param name="Action">What was done, a slug.</param>
/// <param name="Subject">What it was done to, as <c>kind/id</c>.</param>
/// <param name="Content">The facts in few words; never a secret.</param>
/// <param name="RecordDigest">SHA-256 (64 small hexadecimal digits) of the covered record's canonical form; null where it covers none.</param>
public sealed record AuditNote(string Site, Instant At, string Actor, string Action, string Subject, JsonObject Content, string? RecordDigest);
