using System.ComponentModel;

namespace LabWatch.Service.Api.Devices;

/// <summary>An account of a device that was just made.</summary>
internal sealed record DeviceAccountAnswer(DeviceAccountView Device, [property: Description("The password. Shown this once.")] string Password);
