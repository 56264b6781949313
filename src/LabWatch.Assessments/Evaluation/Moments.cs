using System.Globalization;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Evaluation;

/// <summary>Instants in sentences: to the minute, always with the zone.</summary>
public static class Moments
{
    /// <summary>For example 2026-12-01 10:20 UTC.</summary>
    public static string Text(Instant instant) =>
        instant.ToDateTimeOffset().ToString("yyyy-MM-dd HH:mm", CultureInfo.InvariantCulture) + " UTC";
}
