using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.LifeCycle;

namespace LabWatch.Tests.Alerts;

/// <summary>Keeps the conditions that a watch found.</summary>
internal sealed class ConditionList : IConditionSink
{
    public List<AlertCondition> Found { get; } = [];

    public IEnumerable<(string Code, bool Present)> Edges => Found.Select(found => (found.Key.Code, found.Present));

    public void Post(AlertCondition condition) => Found.Add(condition);
}
