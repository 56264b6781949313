namespace LabWatch.Service.Api.Devices;

/// <summary>Accounts of devices.</summary>
internal sealed record DeviceAccountListView(IReadOnlyList<DeviceAccountView> Items);
