using LabWatch.Lab.Alerts;

namespace LabWatch.Alerts;

/// <summary>Takes what the service finds wrong with itself, and makes alerts of it that people receive. Returns at once and never throws.</summary>
public interface IServiceAlerts
{
    /// <summary>Says that something is wrong. Saying it again changes nothing while the alert stands.</summary>
    /// <param name="code">A <see cref="ServiceAlertCode"/>.</param>
    /// <param name="priority">How soon to act.</param>
    /// <param name="headline">What is wrong, at most 160 characters (longer ones are cut).</param>
    /// <param name="what">The same at length.</param>
    /// <param name="toDo">What to do about it.</param>
    void Raise(string code, AlertPriority priority, string headline, string what, string toDo);

    /// <summary>Says that it is right again; nothing happens where there is no such alert.</summary>
    /// <param name="code">A <see cref="ServiceAlertCode"/>.</param>
    /// <param name="headline">What is right again.</param>
    void Clear(string code, string headline);
}
