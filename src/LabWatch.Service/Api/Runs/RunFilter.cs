using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Runs;

/// <summary>Parameters of a list of runs, as text.</summary>
internal sealed record RunFilter(
    [property: FromQuery(Name = "source"), Description("Only of this source, site.source.")] string? Source,
    [property: FromQuery(Name = "open"), Description("`true` for those that last.")] string? Open,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Rows on the page, 1 to 500; 50 where missing.")] string? Count);
