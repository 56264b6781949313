using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Sources;

/// <summary>Parameters of learning a balance, for the description of the API; the endpoint checks them.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="From">Beginning of the span.</param>
/// <param name="Until">End of the span.</param>
internal sealed record BalanceFilter(
    [property: FromQuery(Name = "channel"), Description("Heater power, or a well thermometer that is not the reference.")] string? Channel,
    [property: FromQuery(Name = "from"), Description("Beginning of the span, RFC 3339.")] string? From,
    [property: FromQuery(Name = "until"), Description("End of the span, RFC 3339; 1 to 31 days after its beginning.")] string? Until);
