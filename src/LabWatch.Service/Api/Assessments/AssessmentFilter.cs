using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Assessments;

/// <summary>Parameters of a list of assessments, as text.</summary>
internal sealed record AssessmentFilter(
    [property: FromQuery(Name = "source"), Description("Only this source, site.source.")] string? Source,
    [property: FromQuery(Name = "criterion"), Description("Only this criterion, for example stability.")] string? Criterion,
    [property: FromQuery(Name = "from"), Description("Only windows that end at or after this instant, RFC 3339 with offset.")] string? From,
    [property: FromQuery(Name = "to"), Description("Only windows that end before this instant, RFC 3339 with offset.")] string? To,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Rows on the page, 1 to 500; 50 where missing.")] string? Count);
