using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.SurroundingsParts;

/// <summary>One condition of the room.</summary>
/// <param name="Name">In a sentence.</param>
/// <param name="Figure">Name of its side result.</param>
/// <param name="Unit">SenML unit of the permitted range.</param>
/// <param name="Spelt">Unit in a sentence.</param>
/// <param name="Quantity">What measures it.</param>
/// <param name="Uncalibrated">Standard uncertainty of a sensor without a certificate.</param>
/// <param name="Range">The permitted range among the conditions.</param>
internal sealed record RoomCondition(
    string Name, string Figure, string Unit, string Spelt, ChannelQuantity Quantity, double Uncalibrated, Func<PermittedConditions, PermittedRange?> Range)
{
    public static IReadOnlyList<RoomCondition> All { get; } =
    [
        new("air temperature", "air", "Cel", "degC", ChannelQuantity.AmbientTemperature, SurroundingsPoint.UncalibratedKelvin, conditions => conditions.AirCelsius),
        new("relative humidity", "humidity", "%RH", "%RH", ChannelQuantity.RelativeHumidity, 2, conditions => conditions.RelativeHumidityPercent),
        new("air pressure", "pressure", "Pa", "Pa", ChannelQuantity.AirPressure, 100, conditions => conditions.AirPressurePascal),
    ];

    public PermittedRange? Permitted(ReferenceSource source) => source.Conditions is { } conditions ? Range(conditions) : null;

    public Channel? ChannelOf(ReferenceSource source) => source.Channels.FirstOrDefault(channel => channel.Quantity == Quantity);
}
