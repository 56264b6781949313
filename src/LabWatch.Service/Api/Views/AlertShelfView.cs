using System.ComponentModel;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>Why nobody is told of an alert for a while.</summary>
internal sealed record AlertShelfView(
    [property: Description("Who decided it.")] string By,
    [property: Description("When.")] Instant At,
    [property: Description("When it ends by itself; null for out of service.")] Instant? Until,
    [property: Description("Why.")] string Reason);
