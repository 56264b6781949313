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

    /// <summary>The condition went away.</summary>
    public const string Returned = "returned";
}
