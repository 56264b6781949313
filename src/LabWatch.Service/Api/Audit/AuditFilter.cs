using System.ComponentModel;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Audit;

/// <summary>Parameters of a list of the audit trail, as text.</summary>
internal sealed record AuditFilter(
    [property: FromQuery(Name = "action"), Description("Only this action, for example signed-in.")] string? Action,
    [property: FromQuery(Name = "actor"), Description("Only what this account did; labwatch for the service itself.")] string? Actor,
    [property: FromQuery(Name = "subject"), Description("Only this subject, for example run/0193...; ending in a slash, every subject that begins with it.")] string? Subject,
    [property: FromQuery(Name = "from"), Description("Only at or after this instant, RFC 3339 with offset.")] string? From,
    [property: FromQuery(Name = "to"), Description("Only before this instant, RFC 3339 with offset.")] string? To,
    [property: FromQuery(Name = "after"), Description("`next` of the page before.")] string? After,
    [property: FromQuery(Name = "count"), Description("Entries on the page, 1 to 500; 50 where missing.")] string? Count);
