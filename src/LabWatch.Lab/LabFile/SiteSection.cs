namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>site</c> of a lab file.</summary>
internal static class SiteSection
{
    public static LabSite Read(JsonCursor top)
    {
        if (top.Object("site") is not { } site)
        {
            return new LabSite(string.Empty, string.Empty, "UTC");
        }

        site.OnlyMembers("id", "name", "timeZone");
        string zone = site.Text("timeZone");
        if (zone.Length > 0 && !TimeZoneInfo.TryFindSystemTimeZoneById(zone, out _))
        {
            site.Report("unknown-time-zone", "This time zone is not known here.", "Use an IANA name such as Europe/Dublin, and see that the system's zone data are installed.", "timeZone");
        }

        return new LabSite(site.Id("id"), site.Text("name"), zone);
    }
}
