using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Api.Alerts;
using LabWatch.Service.Api.Assessments;
using LabWatch.Service.Api.Audit;
using LabWatch.Service.Api.Clocks;
using LabWatch.Service.Api.Configured;
using LabWatch.Service.Api.Demo;
using LabWatch.Service.Api.Devices;
using LabWatch.Service.Api.Health;
using LabWatch.Service.Api.Hosting;
using LabWatch.Service.Api.Insight;
using LabWatch.Service.Api.Notifying;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Runs;
using LabWatch.Service.Api.Sources;
using LabWatch.Service.Api.Streaming;
using LabWatch.Simulator;

namespace LabWatch.Service.Api;

/// <summary>Maps the HTTP API.</summary>
internal static class ApiMapping
{
    /// <summary>Adds what every answer goes through, and the endpoints. Call it before <see cref="PagesMapping.MapLabWatchPages"/>.</summary>
    public static WebApplication MapLabWatchApi(this WebApplication app)
    {
        ArgumentNullException.ThrowIfNull(app);
        app.UseForwardedHeaders();
        app.UseResponseCompression();
        SecurityHeaders.Use(app);
        FailureAnswers.Use(app);
        HostGuard.Use(app);
        CrossSiteGuard.Use(app);
        PagesMapping.ServeFiles(app);
        app.UseAuthentication();
        app.UseRateLimiter();
        app.UseAuthorization();
        RouteGroupBuilder api = app.MapGroup("/api/v1");
        SignInEndpoints.Map(api);
        MeEndpoints.Map(api);
        AccountEndpoints.Map(api);
        TokenEndpoints.Map(api);
        DeviceEndpoints.Map(api);
        ClockEndpoints.Map(api);
        SourceEndpoints.Map(api);
        AssessmentEndpoints.Map(api);
        ForecastEndpoints.Map(api);
        AttributionEndpoints.Map(api);
        BudgetEndpoints.Map(api);
        AlertEndpoints.Map(api);
        NotifierEndpoints.Map(api);
        AuditEndpoints.Map(api);
        RunEndpoints.Map(api);
        ConfiguredEndpoints.Map(api);
        StreamEndpoints.Map(api);
        if (app.Services.GetService<ILabSimulation>() is not null)
        {
            FaultEndpoints.Map(api);
        }

        api.Map("{**rest}", (string? rest) => Refusals.NotFound("endpoint", rest, "/openapi/v1.json lists the endpoints.")).ExcludeFromDescription();
        HealthEndpoints.Map(app);
        app.MapOpenApi().AllowStrangers();
        app.MapPrometheusScrapingEndpoint("/metrics").Allow(Permission.Read);
        return app;
    }
}
