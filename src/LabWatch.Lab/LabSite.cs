namespace LabWatch.Lab;

/// <summary>A laboratory site.</summary>
/// <param name="Id">Id of the site (a slug).</param>
/// <param name="Name">Name for people.</param>
/// <param name="TimeZone">IANA name of the time zone that people at the site live by, for example Europe/Dublin.</param>
public sealed record LabSite(string Id, string Name, string TimeZone);
