using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Sources;

/// <summary>Parameters of a read of readings, as text: the reader checks them all before it answers.</summary>
internal sealed record ReadingFilter(
    [property: FromQuery, Description("Id of the channel (required).")] string? Channel,
    [property: FromQuery, Description("First instant of the window, RFC 3339 with offset; one hour before `to` where missing.")] string? From,
    [property: FromQuery, Description("First instant after the window, RFC 3339 with offset; now where missing.")] string? To,
    [property: FromQuery, Description("`auto` (default: raw, or buckets so that there are at most 2,000 rows), `raw`, or the length of a bucket in whole seconds.")] string? Bucket,
    [property: FromQuery, Description("`json` (default) or `csv`.")] string? Format);
