using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Evaluation;

/// <summary>The certificates in force for a channel over a span, one after the other.</summary>
/// <param name="Stretches">Stretches in rising order that fill the span; a stretch without a certificate has null.</param>
public sealed record CertificateTimeline(IReadOnlyList<CertificateStretch> Stretches)
{
    /// <summary>The certificates, each once, as <c>id@revision</c> in ordinal order.</summary>
    public IReadOnlyList<string> References =>
        [.. Stretches.Where(stretch => stretch.Certificate is not null).Select(stretch => ReferenceTo(stretch.Certificate!)).Distinct().Order(StringComparer.Ordinal)];

    /// <summary>The certificate in force at an instant of the span; null where there is none.</summary>
    public Certificate? At(Instant instant) => Stretches.FirstOrDefault(stretch => stretch.Span.Contains(instant))?.Certificate;

    /// <summary>How a certificate is named in provenance.</summary>
    public static string ReferenceTo(Certificate certificate) => certificate.Reference;

    /// <summary>The timeline of a channel over a span.</summary>
    public static CertificateTimeline Of(LabSnapshot snapshot, ChannelKey channel, TimeWindow span)
    {
        IEnumerable<Instant> changes = snapshot.StaysIn(channel)
            .SelectMany(stay => snapshot.CertificatesOf(stay.Instrument)
                .SelectMany(certificate => Edges(certificate.ValidFrom, certificate.WithdrawnFrom))
                .Concat(snapshot.TriplePointChecks
                    .Where(check => string.Equals(check.Instrument, stay.Instrument, StringComparison.Ordinal))
                    .SelectMany(check => Edges(check.At, check.WithdrawnFrom)))
                .Append(stay.From)
                .Append(stay.Until ?? span.End))
            .Where(instant => instant > span.Start && instant < span.End);
        Instant[] edges = [span.Start, .. changes.Distinct().Order(), span.End];
        List<CertificateStretch> stretches = [];
        for (int i = 0; i + 1 < edges.Length; i++)
        {
            Certificate? certificate = snapshot.CertificateInForce(channel, edges[i]);
            if (stretches.Count > 0 && stretches[^1].Certificate == certificate)
            {
                stretches[^1] = stretches[^1] with { Span = new(stretches[^1].Span.Start, edges[i + 1]) };
            }
            else
            {
                stretches.Add(new(new(edges[i], edges[i + 1]), certificate));
            }
        }

        return new(stretches);
    }

    private static IEnumerable<Instant> Edges(Instant from, Instant? withdrawn) => withdrawn is { } end ? [from, end] : [from];
}
