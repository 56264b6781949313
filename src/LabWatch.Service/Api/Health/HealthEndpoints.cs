using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Health;

/// <summary>Whether the process lives, and whether it can do its job.</summary>
internal static class HealthEndpoints
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(2);

    /// <summary>Maps the endpoints.</summary>
    public static void Map(IEndpointRouteBuilder app)
    {
        RouteGroupBuilder group = app.MapGroup("health").WithTags("Health").AllowStrangers();
        group.MapGet("live", Live)
            .WithName("Live")
            .WithSummary("Whether the process answers");
        group.MapGet("ready", ReadyAsync)
            .WithName("Ready")
            .WithSummary("Whether reading store, records, broker and planner do their work now")
            .Produces<HealthView>(StatusCodes.Status503ServiceUnavailable);
    }

    private static Ok<LiveView> Live() => TypedResults.Ok(new LiveView("live", SiteBoard.Version));

    // Strangers learn whether, not what: the parts are for whoever is signed in.
    private static async Task<JsonHttpResult<HealthView>> ReadyAsync(
        HttpContext http, IEnumerable<IDependencyCheck> checks, TimeProvider clock, ILogger<HealthPartView> log, CancellationToken cancellationToken)
    {
        HealthPartView[] parts = await Task.WhenAll(checks.Select(check => AskAsync(check, clock, log, cancellationToken)));
        bool isReady = parts.All(part => part.IsReady);
        return TypedResults.Json(
            new HealthView(isReady ? "ready" : "not-ready", SiteBoard.Version, Caller.Find(http) is null ? [] : parts),
            statusCode: isReady ? StatusCodes.Status200OK : StatusCodes.Status503ServiceUnavailable);
    }

    private static async Task<HealthPartView> AskAsync(IDependencyCheck check, TimeProvider clock, ILogger log, CancellationToken cancellationToken)
    {
        long start = clock.GetTimestamp();
        DependencyAnswer answer;
        try
        {
            answer = await check.AskAsync(cancellationToken).AsTask().WaitAsync(Patience, clock, cancellationToken);
        }
        catch (TimeoutException)
        {
            answer = new DependencyAnswer(false, $"No answer within {Patience.TotalSeconds:F0} s.");
        }
#pragma warning disable CA1031 // Any failure of a part is an answer here: it does not work. The log has the details.
        catch (Exception failure) when (failure is not OperationCanceledException)
#pragma warning restore CA1031
        {
            ApiLog.PartFailed(log, failure, check.Part);
            answer = new DependencyAnswer(false, "It does not work; the log of the service has the details.");
        }

        return new HealthPartView(check.Part, answer.IsReady, answer.Detail, Math.Round(clock.GetElapsedTime(start).TotalMilliseconds, 1));
    }
}
