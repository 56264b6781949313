using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>A device to subscribe: the browser's subscription (Push API, <c>PushSubscription.toJSON()</c>) and a name.</summary>
internal sealed record PushDeviceRequest(
    [property: Description("Name of the device, 1 to 80 characters.")] string? Name,
    [property: Description("Address at the push service.")] string? Endpoint,
    [property: Description("The browser's keys.")] PushDeviceKeys? Keys);
