using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Service.Api.Requests;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Hosting;

/// <summary>Turns what was thrown into problem details that tell nothing of the inside.</summary>
internal static class FailureAnswers
{
    /// <summary>Adds the outermost catch.</summary>
    public static void Use(IApplicationBuilder app) => app.Use(static async (context, next) =>
    {
        try
        {
            await next(context);
        }
        catch (OperationCanceledException) when (context.RequestAborted.IsCancellationRequested)
        {
            // The caller has gone; nobody reads an answer.
        }
        catch (BadHttpRequestException failure) when (!context.Response.HasStarted)
        {
            await Refusals.Malformed(failure.StatusCode).ExecuteAsync(context);
        }
#pragma warning disable CA1031 // The outermost catch of a request: the answer says that it failed, the log why.
        catch (Exception failure) when (!context.Response.HasStarted)
#pragma warning restore CA1031
        {
            ILogger log = context.RequestServices.GetRequiredService<ILoggerFactory>().CreateLogger("LabWatch.Service.Api");
            ApiLog.RequestFailed(log, failure, context.Request.Method, context.Request.Path);
            context.Response.Headers.RetryAfter = IsPassing(failure) ? "5" : default;
            await Of(failure).ExecuteAsync(context);
        }
    });

    private static bool IsPassing(Exception failure) => failure is StoreUnavailableException or RecordsUnavailableException;

    private static ProblemHttpResult Of(Exception failure) => IsPassing(failure)
        ? Refusals.Unavailable("store-unavailable", "The store does not answer now.", "Try again; if it lasts, look at /health/ready and at the log of the service.")
        : Refusals.Failed();
}
