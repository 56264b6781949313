using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Tests.Assessments;

/// <summary>A snapshot with something exchanged.</summary>
internal static class DemoLabVariant
{
    public static LabSnapshot With(
        this LabSnapshot lab,
        Func<ReferenceSource, ReferenceSource>? source = null,
        Func<Certificate, Certificate?>? certificate = null,
        Func<Instrument, Instrument>? instrument = null,
        Func<AcceptanceLimit, AcceptanceLimit>? limit = null,
        IReadOnlyList<TriplePointCheck>? checks = null) => new(
            lab.Site,
            [.. lab.Sources.Select(source ?? (item => item))],
            [.. lab.Instruments.Select(instrument ?? (item => item))],
            lab.Installations,
            [.. lab.Certificates.Select(certificate ?? (item => item)).OfType<Certificate>()],
            [.. lab.Limits.Select(limit ?? (item => item))],
            lab.Notifiers)
        {
            TriplePointChecks = checks ?? lab.TriplePointChecks,
        };
}
