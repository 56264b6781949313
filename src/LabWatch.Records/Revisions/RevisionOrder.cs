using System.Text.Json.Nodes;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>A new revision of one record that carries its revision itself.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Kind">Certificate, triple-point check or limit.</param>
/// <param name="Content">The entry in the lab file's own form; of a certificate or check with the member <c>instrument</c>. Not validated yet.</param>
/// <param name="Author">Account of who makes it.</param>
/// <param name="Reason">Why.</param>
/// <param name="At">When.</param>
public sealed record RevisionOrder(string Site, LabRecordKind Kind, JsonObject Content, string Author, string Reason, Instant At);
