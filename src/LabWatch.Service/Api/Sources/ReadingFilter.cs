using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Sources;

/// <summary>Parameters of a read of readings, as text: the reader checks them all before it answers.</summary>
internal sealed record ReadingFilter(
    [property: FromQuery(Name = "channel"), Description("Id of the channel (required).")] string? Channel,
    [property: FromQuery(Name = "from"), Description("First instant of the window, RFC 3339 with offset; one hour before `to` where missing.")] string? From,
    [property: FromQuery(Name = "to"), Description("First instant after the window, RFC 3339 with offset; now where missing.")] string? To,
    [property: FromQuery(Name = "bucket"), Description("`auto` (default: raw, or buckets so that there are at most 2,000 rows), `raw`, or the length of a bucket in whole seconds.")] string? Bucket,
    [property: FromQuery(Name = "format"), Description("`json` (default) or `csv`.")] string? Format);
