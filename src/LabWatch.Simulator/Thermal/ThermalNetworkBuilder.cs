namespace LabWatch.Simulator.Thermal;

/// <summary>Collects the parts of a <see cref="ThermalNetwork"/>. Each method returns the index by which the network knows the part.</summary>
internal sealed class ThermalNetworkBuilder
{
    private readonly List<double> _capacity = [];
    private readonly List<double> _temperature = [];
    private readonly List<(int A, int B)> _conductiveEnds = [];
    private readonly List<double> _conductance = [];
    private readonly List<(int A, int B)> _radiativeEnds = [];
    private readonly List<double> _exchange = [];

    /// <summary>Adds a node with a heat capacity (J/K, positive) at a temperature (K).</summary>
    public int Node(double jouleThroughKelvin, double kelvin)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(jouleThroughKelvin);
        _capacity.Add(jouleThroughKelvin);
        _temperature.Add(kelvin);
        return _capacity.Count - 1;
    }

    /// <summary>Adds a boundary whose temperature (K) is given from outside.</summary>
    public int Boundary(double kelvin) => Node(double.PositiveInfinity, kelvin);

    /// <summary>Adds a conductive (or convective) link, W/K, zero or more.</summary>
    public int Conduct(int a, int b, double wattPerKelvin)
    {
        _conductiveEnds.Add((a, b));
        _conductance.Add(wattPerKelvin);
        return _conductance.Count - 1;
    }

    /// <summary>Adds a radiative link by its exchange area (area times exchange factor), m^2, zero or more.</summary>
    public int Radiate(int a, int b, double squareMetre)
    {
        _radiativeEnds.Add((a, b));
        _exchange.Add(squareMetre * ThermalNetwork.StefanBoltzmann);
        return _exchange.Count - 1;
    }

    /// <summary>The finished network.</summary>
    public ThermalNetwork Build() =>
        new([.. _capacity], [.. _temperature], [.. _conductiveEnds], [.. _conductance], [.. _radiativeEnds], [.. _exchange]);
}
