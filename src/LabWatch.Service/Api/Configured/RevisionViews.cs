using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records.Revisions;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Configured;

/// <summary>Revisions as the API shows them.</summary>
internal static class RevisionViews
{
    /// <summary>A revision.</summary>
    /// <param name="revision">The revision.</param>
    /// <param name="inForce">References (kind and <c>id@revision</c>) of what is in force.</param>
    public static RevisionView Of(RecordRevision revision, IReadOnlySet<(LabRecordKind, string)> inForce) => new(
        LabEntry.NameOf(revision.Kind),
        revision.Id,
        revision.Revision,
        revision.Reference,
        inForce.Contains((revision.Kind, revision.Reference)),
        revision.EffectiveFrom,
        revision.IsWithdrawal,
        revision.Author,
        revision.Reason,
        revision.RecordedAt,
        revision.Import,
        revision.Digest,
        revision.Entry?.Content);

    /// <summary>What is in force at an instant.</summary>
    public static IReadOnlySet<(LabRecordKind Kind, string Reference)> InForce(LabRecordSet records, LabSnapshot lab, Instant at) =>
        lab.Limits.Where(limit => limit.EffectiveFrom <= at && !(limit.WithdrawnFrom <= at))
            .GroupBy(limit => limit.Id, StringComparer.Ordinal)
            .Select(revisions => (LabRecordKind.Limit, RecordNames.Of(revisions.MaxBy(limit => (limit.EffectiveFrom, limit.Revision))!)))
            .Concat(lab.Instruments.Select(instrument => CertificateInForce(lab, instrument.Id, at)).OfType<Certificate>()
                .Select(certificate => (LabRecordKind.Certificate, RecordNames.Of(certificate))))
            .Concat(records.Revisions.Where(revision => !LabEntry.CarriesRevision(revision.Kind))
                .GroupBy(revision => (revision.Kind, revision.Id))
                .Select(revisions => revisions.MaxBy(revision => revision.Revision)!)
                .Where(revision => !revision.IsWithdrawal)
                .Select(revision => (revision.Kind, revision.Reference)))
            .ToHashSet();

    /// <summary>The certificate of an instrument in force at an instant; null where there is none.</summary>
    public static Certificate? CertificateInForce(LabSnapshot lab, string instrument, Instant at) => lab.Certificates
        .Where(certificate => string.Equals(certificate.Instrument, instrument, StringComparison.Ordinal) && certificate.ValidFrom <= at && !(certificate.WithdrawnFrom <= at))
        .MaxBy(certificate => (certificate.ValidFrom, certificate.Revision));
}
