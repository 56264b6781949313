namespace LabWatch.Simulator.Sources;

/// <summary>Thermal build of a source: heat capacities in J/K, conductances in W/K.</summary>
internal sealed record HeatDesign
{
    /// <summary>Heat capacity of one ring of the cavity wall.</summary>
    public required double RingCapacity { get; init; }

    /// <summary>Heat capacity of the bottom.</summary>
    public required double BottomCapacity { get; init; }

    /// <summary>Conductance from ring to ring along the axis.</summary>
    public required double AxialConductance { get; init; }

    /// <summary>Heat capacity of the heater; zero where the tube itself is the heater.</summary>
    public required double HeaterCapacity { get; init; }

    /// <summary>Conductance from the heater to what it heats.</summary>
    public required double HeaterConductance { get; init; }

    /// <summary>How much more than its share the front third of the cavity is heated, to make good what the aperture loses.</summary>
    public double FrontBoost { get; init; }

    /// <summary>Heat capacity of the bath fluid; null where there is no bath.</summary>
    public double? FluidCapacity { get; init; }

    /// <summary>Conductance from the fluid to each ring and to the bottom.</summary>
    public double FluidToWallConductance { get; init; }

    /// <summary>Conductance to the coolant while the chiller runs; zero where there is none.</summary>
    public double ChillerConductance { get; init; }

    /// <summary>Temperature of the coolant, degree Celsius.</summary>
    public double CoolantCelsius { get; init; }

    /// <summary>Heat capacity of each of the three layers of insulation.</summary>
    public required double InsulationCapacity { get; init; }

    /// <summary>Conductance of the whole insulation.</summary>
    public required double InsulationConductance { get; init; }

    /// <summary>Heat capacity of the outer case.</summary>
    public required double CaseCapacity { get; init; }

    /// <summary>Conductance from the case to the room (convection and radiation).</summary>
    public required double CaseToRoomConductance { get; init; }

    /// <summary>Conductance from the case to its cooling water; zero where there is none.</summary>
    public double CaseToWaterConductance { get; init; }

    /// <summary>Heat capacity of the aperture lip.</summary>
    public required double LipCapacity { get; init; }

    /// <summary>Conductance from the lip to the first ring.</summary>
    public required double LipToWallConductance { get; init; }

    /// <summary>Conductance from the lip to the room.</summary>
    public required double LipToRoomConductance { get; init; }

    /// <summary>Standard deviation of the temperature that moving fluid or gas makes around a well, kelvin.</summary>
    public required double ConvectionKelvin { get; init; }

    /// <summary>Flow of purge gas in normal use, l/min; zero where the source is not purged.</summary>
    public double PurgeFlow { get; init; }

    /// <summary>Heat that the gas takes from the wall, W/K for each l/min.</summary>
    public double PurgeConductancePerFlow { get; init; }
}
