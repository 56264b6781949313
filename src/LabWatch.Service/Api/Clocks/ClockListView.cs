namespace LabWatch.Service.Api.Clocks;

/// <summary>Clocks of devices.</summary>
internal sealed record ClockListView(IReadOnlyList<ClockView> Items);
