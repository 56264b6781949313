namespace LabWatch.Lab.Alerts;

/// <summary>The way a message leaves the service.</summary>
public enum NotifierKind
{
    /// <summary>A line in the service's log.</summary>
    Log,

    /// <summary>An HTTP POST to an address.</summary>
    Webhook,

    /// <summary>An e-mail to an address.</summary>
    Mail,

    /// <summary>A push message to a browser or installed app that a person has subscribed; never in the lab file.</summary>
    Push,
}
