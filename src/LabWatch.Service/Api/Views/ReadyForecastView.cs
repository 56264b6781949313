using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>When a source on its way is expected to be ready: an estimate for planning.</summary>
internal sealed record ReadyForecastView(
    [property: Description("When it can be at its set point at the earliest; null where not known or it is there.")] Instant? ArrivesEarliest,
    [property: Description("When it will be there at the latest if it goes on as lately; null as above.")] Instant? ArrivesLatest,
    [property: Description("When the first window that can show its stability will have been judged; null where not known.")] Instant? ReadyNotBefore);
