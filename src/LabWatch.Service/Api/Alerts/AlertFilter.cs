using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Parameters of a list of alerts, as text.</summary>
internal sealed record AlertFilter(
    [property: FromQuery(Name = "source"), Description("Only this source, site.source.")] string? Source,
    [property: FromQuery(Name = "open"), Description("`true` for those that are not over.")] string? Open,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Rows on the page, 1 to 500; 50 where missing.")] string? Count);
