using LabWatch.Intake.Accounts;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Devices;

/// <summary>An account of a device; its password is shown nowhere.</summary>
internal sealed record DeviceAccountView(string Name, string Source, Instant CreatedAt, string CreatedBy, Instant? RevokedAt)
{
    /// <summary>The view of an account.</summary>
    public static DeviceAccountView Of(DeviceAccount account) => new(account.Name, account.Source, account.CreatedAt, account.CreatedBy, account.RevokedAt);
}
