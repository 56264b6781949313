namespace LabWatch.Simulator.Sources;

/// <summary>What a simulated channel senses.</summary>
internal enum ChannelRole
{
    /// <summary>Thermometer in a well.</summary>
    Well,

    /// <summary>Set point; 0 while the controller is off.</summary>
    SetPoint,

    /// <summary>Heater power.</summary>
    HeaterPower,

    /// <summary>Purge flow.</summary>
    PurgeFlow,

    /// <summary>Dew or frost point at the aperture.</summary>
    DewPoint,

    /// <summary>Outer case.</summary>
    OuterCase,

    /// <summary>Aperture lip.</summary>
    Lip,

    /// <summary>Air of the room.</summary>
    Ambient,

    /// <summary>Relative humidity of the room.</summary>
    Humidity,

    /// <summary>Comparator in a band.</summary>
    Comparator,

    /// <summary>Shutter: 1 open.</summary>
    Shutter,

    /// <summary>Independent cut-out: 1 tripped.</summary>
    Cutout,

    /// <summary>Oxygen in the room.</summary>
    Oxygen,

    /// <summary>Flow of cooling water.</summary>
    CoolingFlow,

    /// <summary>Speed of the stirrer.</summary>
    Stirrer,
}
