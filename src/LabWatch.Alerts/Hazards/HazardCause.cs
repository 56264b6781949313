namespace LabWatch.Alerts.Hazards;

/// <summary>What lies behind a hazard of a source. Each has its texts: the names of the resources begin with these names.</summary>
internal enum HazardCause
{
    /// <summary>A touchable surface below its cold threshold.</summary>
    ColdSurface,

    /// <summary>A thermometer above what the source may reach.</summary>
    OverTemperature,

    /// <summary>Power, and no rise: the thermometer may be out of its well.</summary>
    PowerWithoutRise,

    /// <summary>A rise that the power does not explain: a relay may be stuck, or the power is not seen.</summary>
    RiseWithoutPower,

    /// <summary>Above the set point, heated and rising: the controller does not have the heater.</summary>
    PowerAboveSetPoint,

    /// <summary>Purge gas missing while hot.</summary>
    PurgeLost,

    /// <summary>The gas at the aperture is too moist for the coldest wall.</summary>
    Condensation,

    /// <summary>The air of the room is too moist for the coldest wall, and no purge is confirmed.</summary>
    RoomCondensation,

    /// <summary>Hot, and nobody looks after it.</summary>
    UnattendedHot,

    /// <summary>The independent cut-out has tripped.</summary>
    CutoutTripped,

    /// <summary>The room is short of oxygen.</summary>
    OxygenLow,

    /// <summary>Cooling water missing while heated or hot.</summary>
    CoolingLost,

    /// <summary>The bath is not full enough.</summary>
    BathLevelLow,

    /// <summary>The stirrer stands while heated or hot.</summary>
    StirrerStopped,

    /// <summary>The bath fluid is near its flash point.</summary>
    FlashPointNear,
}
