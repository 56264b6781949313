using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Sources;

/// <summary>
/// The certificate in force along a rising series of times: looked up again only where a stay in the channel or a certificate's validity
/// begins or ends, so that a long series costs a handful of look-ups.
/// </summary>
internal sealed class CertificateLookup
{
    private readonly LabSnapshot _lab;
    private readonly Channel _channel;
    private readonly Instant[] _changes;
    private int _next;
    private Certificate? _current;
    private bool _isKnown;

    /// <summary>Prepares the look-up for a channel.</summary>
    public CertificateLookup(LabSnapshot lab, Channel channel)
    {
        _lab = lab;
        _channel = channel;
        Installation[] stays = [.. lab.Installations.Where(stay => stay.Channel == channel.Key)];
        HashSet<string> instruments = [.. stays.Select(stay => stay.Instrument)];
        _changes =
        [
            .. stays.SelectMany(stay => stay.Until is { } until ? new[] { stay.From, until } : [stay.From])
                .Concat(lab.Certificates.Where(certificate => instruments.Contains(certificate.Instrument)).SelectMany(Edges))
                .Concat(lab.TriplePointChecks.Where(check => instruments.Contains(check.Instrument)).SelectMany(check => Edges(check.At, check.WithdrawnFrom)))
                .Distinct()
                .Order(),
        ];
    }

    /// <summary>The certificate in force at an instant not before that of the call before; null where there is none.</summary>
    public Certificate? At(Instant time)
    {
        int passed = _next;
        while (_next < _changes.Length && _changes[_next] <= time)
        {
            _next++;
        }

        if (!_isKnown || _next != passed)
        {
            _current = _lab.CertificateInForce(_channel.Key, time);
            _isKnown = true;
        }

        return _current;
    }

    private static IEnumerable<Instant> Edges(Certificate certificate) => Edges(certificate.ValidFrom, certificate.WithdrawnFrom);

    private static IEnumerable<Instant> Edges(Instant from, Instant? withdrawn) => withdrawn is { } end ? [from, end] : [from];
}
