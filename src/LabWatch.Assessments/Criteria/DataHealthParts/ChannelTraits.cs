using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.DataHealthParts;

/// <summary>What may be expected of a channel's values, by what it measures.</summary>
internal static class ChannelTraits
{
    /// <summary>
    /// Whether an assessment, a hazard or the reading of the source rests on it. The others are looked at as well, and do not decide.
    /// </summary>
    public static bool Matters(Channel channel) => channel.IsHazardChannel || channel.IsTouchable || channel.Quantity is
        ChannelQuantity.WellThermometer or ChannelQuantity.SetPoint or ChannelQuantity.ApertureLip or ChannelQuantity.AmbientTemperature
        or ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal or ChannelQuantity.PurgeFlow or ChannelQuantity.DewPoint
        or ChannelQuantity.RoomOxygen or ChannelQuantity.CoolingFlow;

    /// <summary>Whether its value is set or switched, so that it may stand still for ever and jump at once.</summary>
    public static bool IsSetOrSwitched(Channel channel) => channel.Quantity is
        ChannelQuantity.SetPoint or ChannelQuantity.Shutter or ChannelQuantity.OverTemperatureCutout or ChannelQuantity.Door
        or ChannelQuantity.HeaterPower or ChannelQuantity.HeaterCurrent or ChannelQuantity.HeaterDuty;

    /// <summary>Whether a value is one at which a channel rests: nothing flows or turns, or the sensor is at an end of its range.</summary>
    public static bool IsResting(Channel channel, double value) =>
        value == channel.SensorMinimum || value == channel.SensorMaximum
        || (value == 0 && channel.Quantity is ChannelQuantity.PurgeFlow or ChannelQuantity.PurgePressure or ChannelQuantity.CoolingFlow
            or ChannelQuantity.StirrerSpeed or ChannelQuantity.BathLevel);

    /// <summary>
    /// Whether readings outside the sensor's range are what the device does in good order: a radiation thermometer below its range shows a
    /// sign for it.
    /// </summary>
    public static bool MayShowOutOfRange(Channel channel) =>
        channel.Quantity is ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal;

    /// <summary>
    /// The largest last digit of a well thermometer that cannot stand still for an hour and a half, because the noise of any bridge or
    /// converter moves it: 5 mK, as 2 mOhm of a Pt100, or 0.1 uV. NaN for the other channels. Common practice, no source.
    /// </summary>
    public static double DigitThatMoves(Channel channel) => channel.Quantity is not ChannelQuantity.WellThermometer ? double.NaN : channel.Unit switch
    {
        "Cel" => 0.005,
        "Ohm" => 0.002,
        "mV" => 0.0001,
        _ => double.NaN,
    };
}
