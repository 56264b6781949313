namespace LabWatch.Simulator.Sources;

/// <summary>A simulated sensor with its readout.</summary>
/// <param name="Id">Id of the channel, as in the lab file.</param>
/// <param name="Role">What it senses.</param>
/// <param name="Unit">Unit of the raw value, SenML name.</param>
/// <param name="Decimals">Decimals of the readout: its resolution is one of the last decimal.</param>
/// <param name="Noise">Standard deviation of white noise, in <paramref name="Unit"/>.</param>
internal sealed record ChannelDesign(string Id, ChannelRole Role, string Unit, int Decimals, double Noise)
{
    /// <summary>Distance from the aperture plane, millimetres.</summary>
    public double PositionMillimetre { get; init; }

    /// <summary>Time constant, seconds; zero for none.</summary>
    public double LagSecond { get; init; }

    /// <summary>Standard deviation from which the sensor's error is drawn, kelvin.</summary>
    public double ErrorKelvin { get; init; }

    /// <summary>Standard deviation from which the sensor's drift is drawn, kelvin a year.</summary>
    public double DriftKelvinPerYear { get; init; }

    /// <summary>Resistance thermometer; null where the readout indicates a temperature.</summary>
    public PlatinumResistance? Resistance { get; init; }

    /// <summary>Scale error of an indicating thermometer, kelvin for each kelvin.</summary>
    public double ScaleError { get; init; }

    /// <summary>Constant part of an indicating thermometer's known correction, kelvin.</summary>
    public double KnownErrorKelvin { get; init; }

    /// <summary>Working band of a comparator.</summary>
    public string? Band { get; init; }

    /// <summary>Edges of the band, micrometres.</summary>
    public (double Lower, double Upper) BandEdges { get; init; }

    /// <summary>Lowest temperature of a comparator, degree Celsius. Below it the readout shows <see cref="UnderRangeCelsius"/>.</summary>
    public double MinimumCelsius { get; init; } = double.NegativeInfinity;

    /// <summary>What the readout shows below its range.</summary>
    public double UnderRangeCelsius => MinimumCelsius - 10;
}
