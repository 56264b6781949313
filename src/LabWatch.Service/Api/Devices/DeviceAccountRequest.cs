using System.ComponentModel;

namespace LabWatch.Service.Api.Devices;

/// <summary>What an account of a device is made from.</summary>
internal sealed record DeviceAccountRequest(
    [property: Description("Name of the account, a slug: the user name in MQTT. Never given again.")] string? Name,
    [property: Description("Key of the source that it publishes for, site.source.")] string? Source);
