using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Service.Api.Live;

/// <summary>The temperature above which a touchable surface raises an alert, for the line in a chart.</summary>
internal static class TouchLimits
{
    /// <summary>The limit of a surface, degree Celsius (where material or contact is unknown the most careful one); null where the channel is no touchable surface.</summary>
    public static double? HotCelsius(Channel channel) =>
        channel.IsTouchable
            ? BurnThreshold.Celsius(channel.Contact?.Material ?? SurfaceMaterial.Unknown, channel.Contact?.ContactTime, channel.Contact?.LaboratoryLimitCelsius)
            : null;
}
