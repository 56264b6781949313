using System.Globalization;
using LabWatch.Lab;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Messages;

/// <summary>Writes instants in the time zone that people at the site live by, with the offset from UTC.</summary>
internal sealed class SiteTime(LabSite site)
{
    private readonly TimeZoneInfo _zone = TimeZoneInfo.TryFindSystemTimeZoneById(site.TimeZone, out TimeZoneInfo? found) ? found : TimeZoneInfo.Utc;

    /// <summary>For example 2026-12-01 09:12:03 +01:00.</summary>
    public string Write(Instant instant) =>
        TimeZoneInfo.ConvertTime(instant.ToDateTimeOffset(), _zone).ToString("yyyy-MM-dd HH:mm:ss zzz", CultureInfo.InvariantCulture);
}
