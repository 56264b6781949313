using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>
/// Units in which a quantity may be read: names of the SenML units registry (RFC 8428 section 12.1, RFC 8798), and UCUM where that has none.
/// </summary>
internal static class ChannelUnits
{
    private static readonly string[] Thermometer = ["Cel", "Ohm", "mV"];
    private static readonly string[] TwoState = ["/"];

    public static IReadOnlyList<string> Of(ChannelQuantity quantity) => quantity switch
    {
        ChannelQuantity.WellThermometer or ChannelQuantity.OuterSurface or ChannelQuantity.ApertureLip or ChannelQuantity.AmbientTemperature => Thermometer,
        ChannelQuantity.ReferenceJunction => ["Cel", "Ohm"],
        ChannelQuantity.SetPoint or ChannelQuantity.DewPoint or ChannelQuantity.ComparatorTemperature => ["Cel"],
        ChannelQuantity.HeaterPower => ["W", "kW"],
        ChannelQuantity.HeaterCurrent => ["A"],
        ChannelQuantity.HeaterDuty => ["/", "%"],
        ChannelQuantity.PurgeFlow or ChannelQuantity.CoolingFlow => ["l/min", "l/s"],
        ChannelQuantity.PurgePressure or ChannelQuantity.AirPressure => ["Pa", "hPa"],
        ChannelQuantity.RelativeHumidity => ["%RH"],
        ChannelQuantity.RoomOxygen or ChannelQuantity.BathLevel => ["%", "/"],
        ChannelQuantity.StirrerSpeed => ["1/min"],
        ChannelQuantity.ComparatorSignal => ["A", "mA", "V", "mV"],
        ChannelQuantity.Shutter or ChannelQuantity.OverTemperatureCutout or ChannelQuantity.Door => TwoState,
        _ => throw new ArgumentOutOfRangeException(nameof(quantity), quantity, null),
    };
}
