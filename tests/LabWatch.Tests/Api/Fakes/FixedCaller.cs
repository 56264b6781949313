using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using Microsoft.AspNetCore.Http;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Every request comes from one person, whose account and role the header <c>X-Test-Caller</c> may change (<c>name role</c>).</summary>
internal sealed class FixedCaller(string name, Role role) : ICallers
{
    public ValueTask<Caller?> FindAsync(HttpContext http) => new(
        http.Request.Headers["X-Test-Caller"].ToString().Split(' ') is [var other, var otherRole]
            ? new Caller(other, other, [Enum.Parse<Role>(otherRole)])
            : new Caller(name, name, [role]));
}
