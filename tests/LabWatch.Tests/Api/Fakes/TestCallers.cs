using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using Microsoft.AspNetCore.Http;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Everybody who calls is the same person: at first Kim, with all roles.</summary>
internal sealed class TestCallers : ICallers
{
    /// <summary>Who calls; null for a stranger.</summary>
    public Caller? Current { get; set; } = new("kim", "Kim Sample", [.. Enum.GetValues<Role>()]);

    /// <summary>Lets the next requests come from somebody with these roles; from a stranger without any.</summary>
    public void Be(params ReadOnlySpan<Role> roles) => Current = roles.IsEmpty ? null : new Caller("kim", "Kim Sample", [.. roles]);

    /// <summary>Lets the next requests come from somebody of another name, with all roles.</summary>
    public void Be(string name) => Current = new Caller(name, name, [.. Enum.GetValues<Role>()]);

    public ValueTask<Caller?> FindAsync(HttpContext http) => ValueTask.FromResult(Current);
}
