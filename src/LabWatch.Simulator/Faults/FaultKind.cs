namespace LabWatch.Simulator.Faults;

/// <summary>What can be made to go wrong with a simulated source. The size of each, its unit and range stand in <see cref="FaultCatalogue"/>.</summary>
public enum FaultKind
{
    /// <summary>A well thermometer's error grows to a size in kelvin.</summary>
    ThermometerDrift,

    /// <summary>A well thermometer repeats its last raw value.</summary>
    ThermometerStuck,

    /// <summary>The coating's emissivity falls by a size.</summary>
    CoatingFall,

    /// <summary>A comparator's error grows to a size in kelvin.</summary>
    ComparatorDrift,

    /// <summary>A share of the purge flow is lost.</summary>
    PurgeLoss,

    /// <summary>Frost of a given thickness (1 is a closed layer) lies in the cavity while it is below 0 degC.</summary>
    Frost,

    /// <summary>The heater's relay is stuck: the heater gives this share of its full power whatever the controller wants.</summary>
    HeaterRelayStuck,

    /// <summary>A thermal bridge of a size in W/K leads from the hot part through the insulation to the outer case.</summary>
    InsulationDamage,

    /// <summary>The shutter stays open.</summary>
    OpenShutter,

    /// <summary>A channel sends nothing.</summary>
    SensorSilent,

    /// <summary>The device's clock is off by a size in seconds (positive: ahead).</summary>
    ClockSkew,
}
