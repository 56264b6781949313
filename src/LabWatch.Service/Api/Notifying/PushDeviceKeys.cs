using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>Keys of a subscription, base64url.</summary>
internal sealed record PushDeviceKeys(
    [property: Description("Public key, an uncompressed point on P-256.")] string? P256dh,
    [property: Description("Authentication secret, 16 bytes.")] string? Auth);
