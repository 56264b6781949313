using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>What the monitoring would miss.</summary>
internal sealed record DriftPowerListView(
    [property: Description("Power with which a shift is found.")] double Power,
    [property: Description("False alarms a year of a criterion of a source.")] double FalseAlarmsPerYear,
    [property: Description("One row a quantity, scope and set point.")] IReadOnlyList<DriftPowerView> Items);
