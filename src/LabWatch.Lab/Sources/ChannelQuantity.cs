namespace LabWatch.Lab.Sources;

/// <summary>What a channel measures.</summary>
public enum ChannelQuantity
{
    /// <summary>Contact thermometer in a well (raw in ohm, millivolt or degree Celsius).</summary>
    WellThermometer,

    /// <summary>Set point of the source's controller, degree Celsius.</summary>
    SetPoint,

    /// <summary>Electrical power of the heater, watt.</summary>
    HeaterPower,

    /// <summary>Electrical current of the heater, ampere.</summary>
    HeaterCurrent,

    /// <summary>Duty of the heater, 0 to 1.</summary>
    HeaterDuty,

    /// <summary>Flow of purge gas, litre per minute.</summary>
    PurgeFlow,

    /// <summary>Supply pressure of the purge gas, pascal.</summary>
    PurgePressure,

    /// <summary>Temperature of an outer surface that can be touched, degree Celsius.</summary>
    OuterSurface,

    /// <summary>Temperature of the aperture lip, degree Celsius.</summary>
    ApertureLip,

    /// <summary>Ambient air temperature, degree Celsius.</summary>
    AmbientTemperature,

    /// <summary>Temperature of the reference junctions of thermocouples, degree Celsius (raw in ohm or degree Celsius).</summary>
    ReferenceJunction,

    /// <summary>Relative humidity of the room, percent.</summary>
    RelativeHumidity,

    /// <summary>Air pressure of the room, pascal.</summary>
    AirPressure,

    /// <summary>Dew or frost point of the gas at the aperture, degree Celsius.</summary>
    DewPoint,

    /// <summary>Volume fraction of oxygen in the room, percent.</summary>
    RoomOxygen,

    /// <summary>Flow of cooling water, litre per minute.</summary>
    CoolingFlow,

    /// <summary>Level of the bath fluid, percent of full.</summary>
    BathLevel,

    /// <summary>Speed of the stirrer, revolutions per minute.</summary>
    StirrerSpeed,

    /// <summary>Radiance temperature shown by the comparator in a band, degree Celsius.</summary>
    ComparatorTemperature,

    /// <summary>Signal of the comparator in a band (raw, ampere or volt).</summary>
    ComparatorSignal,

    /// <summary>Shutter in front of the aperture: 1 open, 0 closed.</summary>
    Shutter,

    /// <summary>Independent over-temperature cut-out: 1 tripped, 0 not.</summary>
    OverTemperatureCutout,

    /// <summary>Door or guard: 1 open, 0 closed.</summary>
    Door,
}
