namespace LabWatch.Lab.Alerts;

/// <summary>The way a message leaves the service.</summary>
public enum NotifierKind
{
    /// <summary>A line in the service's log.</summary>
    Log,

    /// <summary>An HTTP POST to an address.</summary>
    Webhook,
}
