using LabWatch.Service.Api.Requests;

namespace LabWatch.Service.Api.Hosting;

/// <summary>
/// Refuses requests that change something and that another site's page makes a browser send. Browsers say so themselves
/// (Fetch Metadata, Sec-Fetch-Site); a client that is no browser sends no such header.
/// </summary>
internal static class CrossSiteGuard
{
    /// <summary>Adds the guard.</summary>
    public static void Use(IApplicationBuilder app) => app.Use(static (context, next) =>
    {
        string? site = context.Request.Headers["Sec-Fetch-Site"];
        bool changes = !(HttpMethods.IsGet(context.Request.Method) || HttpMethods.IsHead(context.Request.Method) || HttpMethods.IsOptions(context.Request.Method));
        return changes && site is not (null or "" or "same-origin" or "none")
            ? Refusals.Forbidden("cross-site", "Another site's page sent this request.", site, "Use the pages of this service, or a client of your own.").ExecuteAsync(context)
            : next(context);
    });
}
