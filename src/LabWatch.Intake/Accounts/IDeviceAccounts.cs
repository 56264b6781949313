using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Accounts;

/// <summary>The accounts of devices at the embedded broker.</summary>
public interface IDeviceAccounts
{
    /// <summary>All accounts, those taken back included, in order of name.</summary>
    IReadOnlyList<DeviceAccount> List();

    /// <summary>Makes an account with a password of 256 random bits, which is returned and stored nowhere; null where the name was given before.</summary>
    string? Add(string name, SourceKey source, string by, Instant at);

    /// <summary>Takes an account back and cuts its connections; false where there is none, or it was taken back before.</summary>
    bool Revoke(string name, Instant at);
}
