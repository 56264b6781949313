using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Parameters of a list of alerts, as text.</summary>
internal sealed record AlertFilter(
    [property: FromQuery, Description("Only this source, site.source.")] string? Source,
    [property: FromQuery, Description("`true` for those that are not over.")] string? Open,
    [property: FromQuery, Description("`next` of the page before.")] string? After,
    [property: FromQuery, Description("Rows on the page, 1 to 500; 50 where missing.")] string? Count);
