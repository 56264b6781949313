using LabWatch.Intake.Accounts;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab;
using LabWatch.Lab.Identity;

namespace LabWatch.Intake.Brokers.Embedded;

/// <summary>Decides who may connect to the embedded broker, and with which rights.</summary>
/// <param name="outRoot">Root of the topics that the service publishes.</param>
/// <param name="requireAccounts">Whether every device needs an account.</param>
/// <param name="accounts">The accounts; null where there are none.</param>
/// <param name="root">Root of the topics that are taken in.</param>
/// <param name="mappings">Topics beside the root that are taken in.</param>
/// <param name="lab">The lab file in force.</param>
internal sealed class DeviceDoor(string outRoot, bool requireAccounts, DeviceAccountFile? accounts, string root, MappingTable mappings, ILabSnapshotSource lab)
{
    /// <summary>The accounts; null where there are none.</summary>
    public DeviceAccountFile? Accounts => accounts;

    /// <summary>Root of the topics that are taken in.</summary>
    public string Root => root;

    /// <summary>The rights of a user name and password; null where the device is turned away.</summary>
    public DeviceRights? Open(string? user, byte[]? password)
    {
        if (string.IsNullOrEmpty(user))
        {
            return requireAccounts ? null : new DeviceRights(null, root, outRoot, null, SourceOf);
        }

        return accounts?.Find(user, password) is { } account && SourceKey.TryParse(account.Source, out SourceKey source)
            ? new DeviceRights(account.Name, root, outRoot, source, SourceOf)
            : null;
    }

    private SourceKey? SourceOf(string topic) => mappings.Find(topic, lab.Current.Site.Id)?.Source;
}
