using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>A temperature on ITS-90 made from a raw reading through the certificate in force at its time.</summary>
internal sealed record TemperatureView(
    [property: Description("t90, degree Celsius.")] double Celsius,
    [property: Description("Expanded uncertainty that the certificate states, kelvin.")] double? ExpandedUncertaintyKelvin,
    [property: Description("Coverage factor of the expanded uncertainty.")] double? CoverageFactor,
    [property: Description("Certificate used, as id@revision; null where the raw value is taken as it is.")] string? Certificate,
    [property: Description("Whether the value lies inside the certificate's range; outside it is shown, but nothing is traceable.")] bool InsideCertificateRange,
    [property: Description("Device time of the reading.")] Instant Time);
