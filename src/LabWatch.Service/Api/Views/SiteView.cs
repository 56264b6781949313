using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>The site, and the service's clock.</summary>
internal sealed record SiteView(
    [property: Description("Id of the site.")] string Id,
    [property: Description("Name for people.")] string Name,
    [property: Description("IANA name of the time zone that the site lives by.")] string TimeZone,
    [property: Description("Time of the service's clock when this was written; ages are reckoned from it.")] Instant Now,
    [property: Description("Version of the program.")] string Version,
    [property: Description("Whether this is the demo: invented laboratory, simulated telemetry, faults to inject.")] bool IsDemo);
