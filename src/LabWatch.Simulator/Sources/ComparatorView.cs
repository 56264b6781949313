using LabWatch.Simulator.Radiance;

namespace LabWatch.Simulator.Sources;

/// <summary>
/// What a comparator in a band reads: the cavity through the effective emissivity of the simulator's own model, the reflected surroundings, and the
/// size-of-source effect from the lip around the aperture. With the shutter closed it reads the shutter.
/// </summary>
internal sealed class ComparatorView
{
    private const double EmissivityStep = 1e-6;
    private const double ShutterWarmth = 0.02;

    private readonly SourceSimulation _source;
    private readonly BandRadiance _band;
    private readonly CavityView _view;
    private double _emissivity = double.NaN;

    /// <summary>A comparator that looks into a source.</summary>
    public ComparatorView(SourceSimulation source, ChannelDesign channel)
    {
        _source = source;
        _band = new BandRadiance(channel.BandEdges.Lower, channel.BandEdges.Upper);
        _view = new CavityView(SourceNetwork.Exchange(source.Design.Cavity), SourceNetwork.Rings, source.Design.Cavity.ConeHalfAngleDegree);
    }

    /// <summary>Radiance temperature in degree Celsius for a coating, with walls that frost makes warmer towards the room by a share of the difference.</summary>
    public double RadianceTemperature(double emissivity, double frostShare)
    {
        double air = _source.AirCelsius + SourceNetwork.ZeroCelsius;
        double lip = Kelvin(_source.Network.Lip);
        if (!_source.ApertureOpen)
        {
            return air + (ShutterWarmth * (lip - air)) - SourceNetwork.ZeroCelsius;
        }

        // Weights are kept while the coating has not changed by more than a millionth; the grid makes them a function of the coating alone.
        double grid = Math.Round(emissivity / EmissivityStep) * EmissivityStep;
        if (grid != _emissivity)
        {
            _emissivity = grid;
            _view.Evaluate(grid, _source.Truth.DiffuseFraction);
        }

        double background = _band.At(air + _source.Truth.BackgroundKelvin);
        double plate = _band.At(lip);
        double seen = (_view.BackgroundWeight * background) + (_view.PlateWeight * plate);
        for (int i = 0; i < _view.Weights.Length; i++)
        {
            double wall = Kelvin(i);
            seen += _view.Weights[i] * _band.At(wall + (frostShare * (air - wall)));
        }

        double around = _source.Truth.SizeOfSource;
        double radiance = ((1 - around) * seen) + (around * plate);
        return _band.Invert(radiance, Kelvin(_source.Network.Bottom)) - SourceNetwork.ZeroCelsius;
    }

    private double Kelvin(int node) => _source.Network.Celsius(node) + SourceNetwork.ZeroCelsius;
}
