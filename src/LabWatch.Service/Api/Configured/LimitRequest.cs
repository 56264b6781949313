using System.ComponentModel;
using System.Text.Json.Nodes;

namespace LabWatch.Service.Api.Configured;

/// <summary>A new revision of an acceptance limit: the lab file's own form, and why. It is read by the lab file's rules.</summary>
internal sealed record LimitRequest(
    [property: Description("Id of the limit.")] string Id,
    [property: Description("The next revision: 1 for a new limit.")] int Revision,
    [property: Description("Id of the source at the site.")] string Source,
    [property: Description("Code of the criterion.")] string Criterion,
    [property: Description("Largest permitted value, in unit.")] double Maximum,
    [property: Description("Unit of the value.")] string Unit,
    [property: Description("simple-acceptance or guard-band.")] string Rule,
    [property: Description("From when it applies; windows that end later are judged again.")] string EffectiveFrom,
    [property: Description("Set points it applies to: minimumCelsius and maximumCelsius; missing for all.")] JsonObject? Range,
    [property: Description("Working band it applies to; missing for all.")] string? Band,
    [property: Description("Why, 1 to 1,000 characters.")] string Reason);
