using System.ComponentModel;
using LabWatch.Alerts.Push;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Notifying;

/// <summary>One device that takes push messages.</summary>
internal sealed record PushDeviceView(
    [property: Description("Id: a digest of the endpoint.")] string Id,
    [property: Description("Name of the device.")] string Name,
    [property: Description("Host of its push service.")] string Host,
    [property: Description("When it was subscribed.")] Instant CreatedAt)
{
    /// <summary>How a subscription is shown: never its keys.</summary>
    public static PushDeviceView Of(PushSubscription subscription) =>
        new(subscription.Id, subscription.Device, subscription.Endpoint.Host, subscription.CreatedAt);
}
