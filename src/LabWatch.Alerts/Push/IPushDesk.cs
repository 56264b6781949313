using LabWatch.Lab.Findings;

namespace LabWatch.Alerts.Push;

/// <summary>The browsers and installed apps that take push messages. Thread-safe.</summary>
public interface IPushDesk
{
    /// <summary>The key that a browser subscribes with, base64url.</summary>
    string PublicKey { get; }

    /// <summary>The subscriptions of a person.</summary>
    IReadOnlyList<PushSubscription> DevicesOf(string account);

    /// <summary>Whose device a notifier is; null where it is no device, or one that is gone.</summary>
    string? AccountOf(string notifier);

    /// <summary>Adds a subscription, durably; one to the same address takes its place.</summary>
    /// <param name="account">Whose it is.</param>
    /// <param name="device">Name of the device.</param>
    /// <param name="endpoint">Address at the push service, https.</param>
    /// <param name="publicKey">Public key of the browser, base64url.</param>
    /// <param name="secret">Authentication secret, base64url.</param>
    /// <returns>The subscription, or what is wrong.</returns>
    (PushSubscription? Made, IReadOnlyList<Finding> Findings) Add(string account, string device, string endpoint, string publicKey, string secret);

    /// <summary>Takes a subscription of a person away; false where there is none.</summary>
    bool Remove(string account, string id);
}
