using LabWatch.Intake.Diagnostics;
using LabWatch.Service.Api.Access;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Clocks;

/// <summary>The clocks of devices against the clock of this service.</summary>
internal static class ClockEndpoints
{
    /// <summary>Maps the endpoint into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api) => api.MapGet("clocks", List)
        .Allow(Permission.Read)
        .WithTags("Clocks")
        .WithName("ListClocks")
        .WithSummary("The clock of the device of each source against the clock of this service, from the messages since the start");

    private static Ok<ClockListView> List(IIntakeState intake) =>
        TypedResults.Ok(new ClockListView([.. intake.Clocks.OrderBy(clock => clock.Key.ToString(), StringComparer.Ordinal).Select(clock => ClockView.Of(clock.Key, clock.Value))]));
}
