using System.Collections.Immutable;
using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Access;

/// <summary>What each role is allowed: the least that its work needs.</summary>
internal static class Permissions
{
    /// <summary>What one role is allowed.</summary>
    public static ImmutableHashSet<Permission> Of(Role role) => role switch
    {
        Role.Technician => [Permission.Read, Permission.Acknowledge, Permission.RecordRuns, Permission.InjectFaults],
        Role.QualityManager => [Permission.Read, Permission.Acknowledge, Permission.RecordRuns, Permission.ReviseRecords, Permission.ReadTrail, Permission.InjectFaults],
        Role.Auditor => [Permission.Read, Permission.ReadTrail],
        Role.Administrator => [Permission.Read, Permission.ReadTrail, Permission.ManageAccounts, Permission.InjectFaults],
        _ => [],
    };

    /// <summary>What somebody with several roles is allowed: what any of them is.</summary>
    public static ImmutableHashSet<Permission> Of(IEnumerable<Role> roles) => [.. roles.SelectMany(Of)];
}
