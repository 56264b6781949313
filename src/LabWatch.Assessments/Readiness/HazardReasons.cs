using LabWatch.Lab.Alerts;

namespace LabWatch.Assessments.Readiness;

/// <summary>Open hazards of the source.</summary>
internal static class HazardReasons
{
    /// <summary>Hazards that endanger people, not the measurement: they are told, but the source may be fit.</summary>
    private static readonly string[] ToPeopleAlone = [HazardCode.HotSurface, HazardCode.ColdSurface, HazardCode.UnattendedHot, HazardCode.HazardSilent];

    public static IReadOnlyList<ReadinessReason> Of(ReadinessInput input) =>
        [.. input.OpenAlerts
            .Where(alert => alert.Source == input.Source.Key && alert.IsHazard && alert.ReturnedAt is null)
            .Select(alert => new ReadinessReason(alert.Code, alert.Headline, !ToPeopleAlone.Contains(alert.Code, StringComparer.Ordinal)))];
}
