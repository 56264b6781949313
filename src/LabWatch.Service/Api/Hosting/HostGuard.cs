using LabWatch.Service.Api.Requests;
using LabWatch.Service.Web;
using Microsoft.Extensions.Primitives;

namespace LabWatch.Service.Api.Hosting;

/// <summary>Refuses requests that call the service by a name that is not its own, as a page does whose name was made to lead here (DNS rebinding).</summary>
internal static class HostGuard
{
    /// <summary>Adds the guard, where names are known.</summary>
    public static void Use(WebApplication app)
    {
        StringSegment[] allowed = [.. app.Services.GetService<HostNames>()?.Allowed.Select(name => (StringSegment)name) ?? []];
        if (allowed.Length > 0)
        {
            app.Use((context, next) => HostString.MatchesAny(context.Request.Host.Host, allowed)
                ? next(context)
                : Refusals.WrongHost(context.Request.Host.Host).ExecuteAsync(context));
        }
    }
}
