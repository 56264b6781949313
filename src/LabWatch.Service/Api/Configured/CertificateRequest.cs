using System.ComponentModel;
using System.Text.Json.Nodes;

namespace LabWatch.Service.Api.Configured;

/// <summary>A new revision of a certificate: the lab file's own form, the instrument, and why. It is read by the lab file's rules.</summary>
internal sealed record CertificateRequest(
    [property: Description("Id of the instrument.")] string Instrument,
    [property: Description("Id of the certificate.")] string Id,
    [property: Description("The next revision: 1 for a new certificate.")] int Revision,
    [property: Description("Number printed on it.")] string Number,
    [property: Description("Who issued it.")] string Issuer,
    [property: Description("From when it is in force; windows from then on are judged again.")] string ValidFrom,
    [property: Description("When recalibration is due; missing where no interval is set.")] string? DueAt,
    [property: Description("What it covers: minimumCelsius and maximumCelsius.")] JsonObject Range,
    [property: Description("How a raw value becomes t90, as in the lab file.")] JsonObject Characteristic,
    [property: Description("Source that a comparator was calibrated against; missing where its traceability is independent.")] string? CalibratedAgainst,
    [property: Description("Why, 1 to 1,000 characters.")] string Reason);
