using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Configured;

/// <summary>Parameters of a list of limits, as text.</summary>
internal sealed record LimitFilter(
    [property: FromQuery(Name = "source"), Description("Only of this source, site.source.")] string? Source,
    [property: FromQuery(Name = "criterion"), Description("Only of this criterion, for example stability.")] string? Criterion,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Rows on the page, 1 to 500; 100 where missing.")] string? Count);
