namespace LabWatch.Alerts.Hazards;

/// <summary>What an observation changed in a <see cref="ConditionFilter"/>.</summary>
internal enum ConditionEdge
{
    None,
    Raised,
    Returned,
}
