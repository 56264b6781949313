using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Links;

/// <summary>Links in messages that lead to one alert for a while. They show nothing to a stranger: who opens one signs in first.</summary>
public interface IAlertLinks
{
    /// <summary>The alert of a link's token; null where the token is no good or has expired.</summary>
    Guid? Read(string token, Instant now);
}
