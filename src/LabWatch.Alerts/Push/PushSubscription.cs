using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Push;

/// <summary>One browser or installed app of one person that takes push messages.</summary>
/// <param name="Id">Digest of the endpoint: subscribing again changes nothing.</param>
/// <param name="Account">Whose it is.</param>
/// <param name="Device">Name of the device for people.</param>
/// <param name="Endpoint">Address at the push service.</param>
/// <param name="PublicKey">Public key of the browser, base64url.</param>
/// <param name="Secret">Authentication secret, base64url. It is never shown.</param>
/// <param name="CreatedAt">When it was made.</param>
public sealed record PushSubscription(string Id, string Account, string Device, Uri Endpoint, string PublicKey, string Secret, Instant CreatedAt);
