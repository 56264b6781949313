using LabWatch.Records.Accounts;

namespace LabWatch.Service.Api.Access;

/// <summary>Everybody may everything, under one name.</summary>
internal sealed class OpenHouse : ICallers
{
    private static readonly Caller Anybody = new("anybody", "Anybody", [.. Enum.GetValues<Role>()]);

    public ValueTask<Caller?> FindAsync(HttpContext http) => ValueTask.FromResult<Caller?>(Anybody);
}
