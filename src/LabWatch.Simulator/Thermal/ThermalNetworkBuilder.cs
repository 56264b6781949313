namespace LabWatch.Simulator.Thermal;

/// <summary>Collects the parts of a <see cref="ThermalNetwork"/>. Each method returns the index by which the network knows the part.</summary>
internal sealed class ThermalNetworkBuilder
{
    private readonly List<double> _capacity = [];
    private readonly List<double> _temperature = [];
    private readonly List<ThermalLink> _conductive = [];
    private readonly List<ThermalLink> _radiative = [];

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
        _conductive.Add(new ThermalLink(a, b, wattPerKelvin));
        return _conductive.Count - 1;
    }

    /// <summary>Adds a radiative link by its exchange area (area times exchange factor), m^2, zero or more.</summary>
    public int Radiate(int a, int b, double squareMetre)
    {
        _radiative.Add(new ThermalLink(a, b, squareMetre * ThermalNetwork.StefanBoltzmann));
        return _radiative.Count - 1;
    }

    /// <summary>The finished network.</summary>
    public ThermalNetwork Build() => new([.. _capacity], [.. _temperature], [.. _conductive], [.. _radiative]);
}
