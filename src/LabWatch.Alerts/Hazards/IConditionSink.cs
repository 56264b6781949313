using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Alerts.Hazards;

/// <summary>Takes conditions as they appear and go. Returns at once and never throws.</summary>
internal interface IConditionSink
{
    /// <summary>Hands over one condition.</summary>
    void Post(AlertCondition condition);
}
