using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Sources;

/// <summary>Parameters of a profile, as text: the reader checks them all before it answers.</summary>
internal sealed record ProfileFilter(
    [property: FromQuery(Name = "at"), Description("The instant, RFC 3339 with offset; now where missing.")] string? At);
