namespace LabWatch.Alerts.LifeCycle;

/// <summary>Names of the steps in the life of an alert, as they stand in records and messages.</summary>
public static class AlertEvent
{
    /// <summary>The condition appeared.</summary>
    public const string Raised = "raised";

    /// <summary>The condition appeared again, or became graver, before the alert was over: the alert stays the same one.</summary>
    public const string RaisedAgain = "raised-again";

    /// <summary>Somebody acknowledged it.</summary>
    public const string Acknowledged = "acknowledged";

    /// <summary>Somebody shelved it until an end.</summary>
    public const string Shelved = "shelved";

    /// <summary>Its shelf has ended, or was ended by somebody.</summary>
    public const string Unshelved = "unshelved";

    /// <summary>A quality manager took it out of service.</summary>
    public const string OutOfService = "out-of-service";

    /// <summary>A quality manager put it back into service.</summary>
    public const string ReturnedToService = "returned-to-service";

    /// <summary>People were told of it and others together, in one message.</summary>
    public const string Summarised = "summarised";

    /// <summary>The condition went away.</summary>
    public const string Returned = "returned";
}
