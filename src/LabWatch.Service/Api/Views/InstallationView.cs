using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The instrument in a channel now, with its certificate in force.</summary>
internal sealed record InstallationView(
    [property: Description("Id of the channel.")] string Channel,
    [property: Description("Id of the instrument.")] string Instrument,
    [property: Description("Serial number as engraved.")] string SerialNumber,
    [property: Description("What it is, in words.")] string Description,
    [property: Description("First instant of its stay in the channel.")] Instant Since,
    [property: Description("Certificate in force, as id@revision; null where it has none.")] string? Certificate,
    [property: Description("Number printed on the certificate.")] string? CertificateNumber,
    [property: Description("Who issued it.")] string? Issuer,
    [property: Description("From when it is valid.")] Instant? ValidFrom,
    [property: Description("When recalibration is due; null where no interval is set.")] Instant? DueAt);
