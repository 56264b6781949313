using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Hosting;
using Microsoft.Extensions.FileProviders;
using Microsoft.Net.Http.Headers;

namespace LabWatch.Service.Api;

/// <summary>Serves the pages.</summary>
internal static class PagesMapping
{
    private const string ForEver = "public, max-age=31536000, immutable";
    private const string AskAgain = "no-cache";

    // Every address at which a page of dashboards/src/shell/routes.ts opens.
    private static readonly string[] Pages = ["/", "/sources/{id}", "/sign-in", "/set-up", "/trail", "/people", "/me"];

    /// <summary>Serves the files of the pages, to strangers too: they hold no data. Call it before what asks who calls.</summary>
    public static void ServeFiles(WebApplication app)
    {
        PagesFolder folder = app.Services.GetRequiredService<PagesFolder>();
        if (folder.IsBuilt)
        {
            app.UseStaticFiles(Options(folder));
        }
    }

    /// <summary>Serves the built pages, or a page that says how to build them.</summary>
    public static WebApplication MapLabWatchPages(this WebApplication app)
    {
        ArgumentNullException.ThrowIfNull(app);
        PagesFolder folder = app.Services.GetRequiredService<PagesFolder>();
        if (!folder.IsBuilt)
        {
            ApiLog.PagesMissing(app.Logger, folder.Path);
            app.MapGet("/", () => TypedResults.Content(Unbuilt, "text/html; charset=utf-8")).ExcludeFromDescription().AllowStrangers();
            return app;
        }

        StaticFileOptions options = Options(folder);
        foreach (string page in Pages)
        {
            app.MapFallbackToFile(page, "index.html", options).AllowStrangers();
        }

        MapUnknown(app, folder);
        return app;
    }

    private static StaticFileOptions Options(PagesFolder folder) =>
        new()
        {
            FileProvider = new PhysicalFileProvider(folder.Path),
            OnPrepareResponse = static context =>
            {
                // Names under assets/ carry a hash of the content.
                bool isHashed = context.Context.Request.Path.StartsWithSegments("/assets", StringComparison.Ordinal);
                context.Context.Response.Headers[HeaderNames.CacheControl] = isHashed ? ForEver : AskAgain;
            },
        };

    // An address that leads nowhere: a person gets a page that says so, a program the plain status.
    private static void MapUnknown(WebApplication app, PagesFolder folder) => app.MapFallback(async context =>
    {
        context.Response.StatusCode = StatusCodes.Status404NotFound;
        if (context.Request.Headers.Accept.ToString().Contains("text/html", StringComparison.OrdinalIgnoreCase))
        {
            context.Response.ContentType = "text/html; charset=utf-8";
            context.Response.Headers[HeaderNames.CacheControl] = AskAgain;
            await context.Response.SendFileAsync(Path.Combine(folder.Path, "index.html"), context.RequestAborted);
        }
    }).AllowStrangers();

    private const string Unbuilt = """
        <!doctype html>
        <html lang="en">
        <head><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>LabWatch</title></head>
        <body>
        <h1>LabWatch is running</h1>
        <p>The pages were not built with this service. They need Node.js 20.19 or later: install it (with npm), then build the service again:</p>
        <pre>dotnet build src/LabWatch.Service</pre>
        <p>Everything else works: <a href="/health/ready">health</a>, <a href="/api/v1/sources">sources</a>, <a href="/api/v1/alerts?open=true">open alerts</a>, <a href="/openapi/v1.json">description of the API</a>.</p>
        <p>LabWatch is not a protective device. Independent protection and local rules remain in force.</p>
        </body>
        </html>
        """;
}
