namespace LabWatch.Lab.Alerts;

/// <summary>State of an alert in the life cycle of IEC 62682 / ANSI/ISA-18.2.</summary>
public enum AlertState
{
    /// <summary>The condition is present and nobody has acknowledged it.</summary>
    RaisedUnacknowledged,

    /// <summary>The condition is present and somebody has acknowledged it.</summary>
    RaisedAcknowledged,

    /// <summary>The condition has gone, but nobody has acknowledged it.</summary>
    ReturnedUnacknowledged,

    /// <summary>The condition has gone and somebody has acknowledged it: the alert is over.</summary>
    Normal,
}
