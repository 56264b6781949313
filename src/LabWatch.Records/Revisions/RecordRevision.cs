using System.Text.Json.Nodes;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;

namespace LabWatch.Records.Revisions;

/// <summary>One revision of a record of what is configured about a site. It is never changed; the next one supersedes it.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Kind">What it is.</param>
/// <param name="Id">Id at the site.</param>
/// <param name="Revision">1 for the first, more for each later one; of certificates, triple-point checks and limits the number that they carry.</param>
/// <param name="Sequence">Number in the order of recording at the site.</param>
/// <param name="EffectiveFrom">First instant at which it holds.</param>
/// <param name="Author">Who made it: an account, <c>labwatch</c> for the service itself, <c>os/NAME</c> for whoever ran the program.</param>
/// <param name="Reason">Why.</param>
/// <param name="RecordedAt">When.</param>
/// <param name="Content">The entry in the lab file's own form, as canonical JSON (RFC 8785); null for a withdrawal.</param>
/// <param name="Digest">SHA-256 of the content, small hexadecimal digits; that of nothing for a withdrawal.</param>
/// <param name="Import">Number of the import that brought it; null for an edit.</param>
public sealed record RecordRevision(
    string Site,
    LabRecordKind Kind,
    string Id,
    int Revision,
    long Sequence,
    Instant EffectiveFrom,
    string Author,
    string Reason,
    Instant RecordedAt,
    string? Content,
    string Digest,
    int? Import)
{
    /// <summary>How the record is named: <c>id@revision</c>.</summary>
    public string Reference => FormattableString.Invariant($"{Id}@{Revision}");

    /// <summary>Whether it takes the record out of force.</summary>
    public bool IsWithdrawal => Content is null;

    /// <summary>The entry; null for a withdrawal.</summary>
    public LabEntry? Entry => Content is null
        ? null
        : new LabEntry(Kind, Id, LabEntry.CarriesRevision(Kind) ? Revision : null, JsonNode.Parse(Content)!.AsObject());
}
