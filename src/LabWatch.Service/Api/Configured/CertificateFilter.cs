using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Configured;

/// <summary>Parameters of a list of certificates, as text.</summary>
internal sealed record CertificateFilter(
    [property: FromQuery(Name = "instrument"), Description("Only of this instrument.")] string? Instrument,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Rows on the page, 1 to 500; 100 where missing.")] string? Count);
