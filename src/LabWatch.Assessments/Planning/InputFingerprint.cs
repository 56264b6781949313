using System.Buffers.Binary;
using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using LabWatch.Lab;
using LabWatch.Lab.Identity;

namespace LabWatch.Assessments.Planning;

/// <summary>
/// A number that changes when the description, certificates, installations, checks or limits of a source change: compared with the stored one, it tells whether
/// standing assessments must be looked at, also after a restart.
/// </summary>
internal static class InputFingerprint
{
    /// <summary>The fingerprint, positive.</summary>
    public static long Of(LabSnapshot snapshot, SourceKey source)
    {
        HashSet<string> instruments = [.. snapshot.Installations.Where(stay => stay.Channel.Source == source).Select(stay => stay.Instrument)];
        IEnumerable<string> lines = snapshot.Installations
            .Where(stay => stay.Channel.Source == source)
            .Select(stay => Line("stay", stay.Instrument, stay.Channel.Channel, stay.From, stay.Until))
            .Concat(snapshot.Certificates
                .Where(certificate => instruments.Contains(certificate.Instrument))
                .Select(certificate => Line("certificate", certificate.Id, certificate.Revision, certificate.Instrument, certificate.ValidFrom, certificate.WithdrawnFrom)))
            .Concat(snapshot.TriplePointChecks
                .Where(check => instruments.Contains(check.Instrument))
                .Select(check => Line("check", check.Id, check.Revision, check.Instrument, check.At, check.WithdrawnFrom)))
            .Concat(snapshot.Sources.Concat(snapshot.FormerSources)
                .Where(revision => revision.Key == source)
                .Select(revision => Line("source", revision.Reference, revision.EffectiveFrom)))
            .Concat(snapshot.Limits
                .Where(limit => limit.Source == source)
                .Select(limit => Line("limit", limit.Id, limit.Revision, limit.Criterion, limit.EffectiveFrom, limit.MinimumCelsius, limit.MaximumCelsius, limit.Band, limit.WithdrawnFrom)))
            .Order(StringComparer.Ordinal);
        byte[] hash = SHA256.HashData(Encoding.UTF8.GetBytes(string.Join('\n', lines)));
        return BinaryPrimitives.ReadInt64BigEndian(hash) & long.MaxValue | 1;
    }

    private static string Line(params object?[] parts) =>
        string.Join(' ', parts.Select(part => Convert.ToString(part, CultureInfo.InvariantCulture) ?? "-"));
}
