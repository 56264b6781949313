namespace LabWatch.Simulator.Sources;

/// <summary>Everything that one source carries from one second to the next.</summary>
internal sealed record SourceState
{
    /// <summary>Temperatures of the nodes, kelvin.</summary>
    public required double[] Nodes { get; init; }

    /// <summary>Lagged values of the sensors, by channel; a sensor without lag has zero.</summary>
    public required double[] Lags { get; init; }

    /// <summary>Value that a stuck sensor repeats, in units of its last decimal; null where it is not stuck.</summary>
    public required long?[] Held { get; init; }

    /// <summary>Lagged control sensor, degree Celsius.</summary>
    public required double Control { get; init; }

    /// <summary>Integral part of the controller, W.</summary>
    public required double Integral { get; init; }

    /// <summary>Ramped set point; null while switched off.</summary>
    public double? RampedSetPoint { get; init; }

    /// <summary>Measured value that the controller saw last; null where none.</summary>
    public double? Previous { get; init; }

    /// <summary>Heater power of the last second, W.</summary>
    public required double HeaterWatt { get; init; }

    /// <summary>Purge flow of the last second, l/min.</summary>
    public required double PurgeFlow { get; init; }

    /// <summary>Dew point at the aperture, degree Celsius.</summary>
    public required double DewPoint { get; init; }

    /// <summary>Thickness of frost, 0 to 1.</summary>
    public required double Frost { get; init; }

    /// <summary>Whether the cut-out has tripped.</summary>
    public required bool Tripped { get; init; }
}
