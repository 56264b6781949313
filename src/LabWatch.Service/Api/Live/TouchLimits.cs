using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Service.Api.Live;

/// <summary>The temperature above which a touchable surface raises an alert, for the line in a chart.</summary>
internal static class TouchLimits
{
    /// <summary>The limit of a surface, degree Celsius; null where the channel is no touchable surface.</summary>
    public static double? HotCelsius(Channel channel) =>
        channel.Contact is { } contact
            ? BurnThreshold.Celsius(contact.Material, contact.ContactTime, contact.LaboratoryLimitCelsius)
            : null;
}
