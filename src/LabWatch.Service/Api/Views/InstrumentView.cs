using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>An instrument with its stays and certificates.</summary>
internal sealed record InstrumentView(
    [property: Description("Id of the instrument.")] string Id,
    [property: Description("Serial number as engraved.")] string SerialNumber,
    [property: Description("What it is, in words.")] string Description,
    [property: Description("From when it is no more one of the site's; null while it is.")] Instant? WithdrawnFrom,
    [property: Description("Where it was when, earliest first.")] IReadOnlyList<StayView> Installations,
    [property: Description("Its certificates as id@revision; GET /api/v1/certificates shows them.")] IReadOnlyList<string> Certificates,
    [property: Description("The certificate in force now as id@revision; null where there is none.")] string? CertificateInForce,
    [property: Description("Every recorded revision of the instrument and of its stays, newest first.")] IReadOnlyList<RevisionView> Revisions);
