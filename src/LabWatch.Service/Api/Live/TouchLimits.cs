using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Service.Api.Live;

/// <summary>The temperature above which a touchable surface raises an alert, for the line in a chart.</summary>
internal static class TouchLimits
{
    /// <summary>Whether a channel is a surface that somebody can touch.</summary>
    public static bool IsTouchable(Channel channel) =>
        channel.Contact is not null || channel.Quantity is ChannelQuantity.OuterSurface or ChannelQuantity.ApertureLip;

    /// <summary>The limit of a surface, degree Celsius (where material or contact is unknown the most careful one); null where the channel is no touchable surface.</summary>
    public static double? HotCelsius(Channel channel) =>
        IsTouchable(channel)
            ? BurnThreshold.Celsius(channel.Contact?.Material ?? SurfaceMaterial.Unknown, channel.Contact?.ContactTime, channel.Contact?.LaboratoryLimitCelsius)
            : null;
}
