namespace LabWatch.Intake.Diagnostics;

/// <summary>How the link to the external broker stands.</summary>
public enum BrokerLinkState
{
    /// <summary>No external broker is configured, or the service is stopping.</summary>
    None,

    /// <summary>Being connected, or waiting to try again.</summary>
    Connecting,

    /// <summary>Connected with the persistent session; readings are stored and acknowledged.</summary>
    Connected,

    /// <summary>Connected without a session: hazards are watched, the broker keeps the readings until they can be stored.</summary>
    WatchingOnly,

    /// <summary>Another client took the session; it is left alone for a while. Hazards are watched without a session.</summary>
    TakenOver,
}
