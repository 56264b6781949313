using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>An acceptance limit of a source in force now.</summary>
internal sealed record LimitView(
    [property: Description("The limit as id@revision.")] string Id,
    [property: Description("Code of the criterion.")] string Criterion,
    [property: Description("Largest permitted value, in unit.")] double Maximum,
    [property: Description("Unit of the value.")] string Unit,
    [property: Description("How the decision is taken: simple-acceptance or guard-band.")] string Rule,
    [property: Description("Lowest set point it applies to, degree Celsius; null where open.")] double? MinimumCelsius,
    [property: Description("Highest set point it applies to, degree Celsius; null where open.")] double? MaximumCelsius,
    [property: Description("Working band it applies to; null for all.")] string? Band,
    [property: Description("Since when it applies.")] Instant EffectiveFrom);
