using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;

namespace LabWatch.Alerts.LifeCycle;

/// <summary>What an alert is about: there is at most one alert with a standing condition for each key.</summary>
/// <param name="Source">The source.</param>
/// <param name="Code">A <see cref="HazardCode"/> or the code of a criterion.</param>
/// <param name="Subject">Id of the channel, or scope of the assessment; empty for the source as a whole.</param>
internal readonly record struct AlertKey(SourceKey Source, string Code, string Subject)
{
    /// <summary>The key of an alert.</summary>
    public static AlertKey Of(Alert alert) => new(alert.Source, alert.Code, alert.Subject);
}
