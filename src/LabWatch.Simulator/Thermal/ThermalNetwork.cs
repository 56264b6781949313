namespace LabWatch.Simulator.Thermal;

/// <summary>
/// Lumped thermal network: nodes with a heat capacity, boundaries with a given temperature, conductive and radiative links between them
/// (Incropera and DeWitt, Fundamentals of Heat and Mass Transfer, 6th ed., sections 3.1, 5.1 and 13.2). Temperatures in kelvin, heat in watt
/// and joule. Every link takes from one end what it gives to the other, so energy is conserved to rounding for any step.
/// </summary>
/// <remarks>
/// Integrated by the explicit midpoint rule with sub-steps short enough to be stable: the rule is stable for |lambda| h of 2 and less on the real axis,
/// and Gershgorin's theorem bounds |lambda| by twice the largest sum of conductances over heat capacity. Not safe for use by several threads.
/// </remarks>
internal sealed class ThermalNetwork
{
    /// <summary>Longest permitted step, seconds.</summary>
    public const double LongestStepSecond = 3600;

    /// <summary>Stefan-Boltzmann constant, W m^-2 K^-4 (exact SI value of 2019, rounded to ten digits).</summary>
    public const double StefanBoltzmann = 5.670374419e-8;

    private const double SafeRateTimesStep = 0.9;
    private const double CeilingMarginKelvin = 50;

    private readonly double[] _inverseCapacity;
    private readonly double[] _temperature;
    private readonly double[] _middle;
    private readonly double[] _fourthPower;
    private readonly double[] _flow;
    private readonly double[] _heat;
    private readonly double[] _received;
    private readonly ThermalLink[] _conductive;
    private readonly ThermalLink[] _radiative;
    private readonly double[] _capacity;
    private double _ratedCeiling = double.NegativeInfinity;
    private double _rate;

    /// <summary>Takes over the parts that a <see cref="ThermalNetworkBuilder"/> has collected; a boundary has an infinite capacity.</summary>
    internal ThermalNetwork(double[] capacity, double[] temperature, ThermalLink[] conductive, ThermalLink[] radiative)
    {
        _capacity = capacity;
        _temperature = temperature;
        _conductive = conductive;
        _radiative = radiative;
        _inverseCapacity = Array.ConvertAll(capacity, static value => 1 / value);
        _middle = new double[capacity.Length];
        _fourthPower = new double[capacity.Length];
        _flow = new double[capacity.Length];
        _heat = new double[capacity.Length];
        _received = new double[capacity.Length];
    }

    /// <summary>Temperatures of nodes and boundaries, kelvin, by index.</summary>
    public ReadOnlySpan<double> Temperatures => _temperature;

    /// <summary>Heat brought in by heat sources since construction, joule.</summary>
    public double SuppliedJoule { get; private set; }

    /// <summary>Heat that a boundary has received since construction, joule (negative where it gave).</summary>
    public double ReceivedJoule(int boundary) => _received[boundary];

    /// <summary>Energy stored in all nodes above a state of the same network, joule.</summary>
    public double StoredAbove(ReadOnlySpan<double> temperatures)
    {
        double sum = 0;
        for (int i = 0; i < _capacity.Length; i++)
        {
            if (double.IsFinite(_capacity[i]))
            {
                sum += _capacity[i] * (_temperature[i] - temperatures[i]);
            }
        }

        return sum;
    }

    /// <summary>Sets the heat supplied to a node from now on, watt.</summary>
    public void SetHeat(int node, double watt) => _heat[node] = watt;

    /// <summary>Sets the temperature of a boundary (or, when a state is restored, of a node), kelvin.</summary>
    public void SetTemperature(int index, double kelvin) => _temperature[index] = kelvin;

    /// <summary>Sets the conductance of a conductive link, W/K, zero or more.</summary>
    public void SetConductance(int link, double wattPerKelvin) => Change(ref _conductive[link], wattPerKelvin);

    /// <summary>Sets the exchange area (area times exchange factor) of a radiative link, m^2, zero or more.</summary>
    public void SetExchangeArea(int link, double squareMetre) => Change(ref _radiative[link], squareMetre * StefanBoltzmann);

    /// <summary>Advances by a step of more than zero and at most <see cref="LongestStepSecond"/>.</summary>
    public void Advance(double seconds)
    {
        if (!(seconds > 0 && seconds <= LongestStepSecond))
        {
            throw new ArgumentOutOfRangeException(nameof(seconds), seconds, "A step is above 0 s and at most 3600 s.");
        }

        double remaining = seconds;
        while (remaining > 0)
        {
            double step = Math.Min(remaining, 1);
            int parts = Math.Max(1, (int)Math.Ceiling(step * Rate() / SafeRateTimesStep));
            for (int i = 0; i < parts; i++)
            {
                Midpoint(step / parts);
            }

            remaining -= step;
        }
    }

    private void Change(ref ThermalLink link, double value)
    {
        if (!(value >= 0))
        {
            throw new ArgumentOutOfRangeException(nameof(value), value, "A conductance is zero or more.");
        }

        if (link.Strength != value)
        {
            link = link with { Strength = value };
            _ratedCeiling = double.NegativeInfinity;
        }
    }

    private void Midpoint(double step)
    {
        Flows(_temperature);
        for (int i = 0; i < _temperature.Length; i++)
        {
            _middle[i] = _temperature[i] + (0.5 * step * _flow[i] * _inverseCapacity[i]);
        }

        Flows(_middle);
        for (int i = 0; i < _temperature.Length; i++)
        {
            double change = step * _flow[i];
            _temperature[i] += change * _inverseCapacity[i];
            _received[i] += change;
            SuppliedJoule += step * _heat[i];
        }
    }

    private void Flows(double[] temperature)
    {
        for (int i = 0; i < temperature.Length; i++)
        {
            double square = temperature[i] * temperature[i];
            _fourthPower[i] = square * square;
            _flow[i] = _heat[i];
        }

        Carry(_conductive, temperature, _flow);
        Carry(_radiative, _fourthPower, _flow);
    }

    private static void Carry(ThermalLink[] links, double[] potential, double[] flow)
    {
        foreach (ref readonly ThermalLink link in links.AsSpan())
        {
            double heat = link.Strength * (potential[link.A] - potential[link.B]);
            flow[link.A] -= heat;
            flow[link.B] += heat;
        }
    }

    private double Rate()
    {
        double hottest = 0;
        foreach (double temperature in _temperature)
        {
            hottest = Math.Max(hottest, temperature);
        }

        // A function of the present temperatures alone, so that a restored state takes the same sub-steps as the one that ran on.
        double ceiling = (Math.Ceiling(hottest / CeilingMarginKelvin) + 1) * CeilingMarginKelvin;
        if (ceiling != _ratedCeiling)
        {
            _ratedCeiling = ceiling;
            _rate = RateAt(ceiling);
        }

        return _rate;
    }

    private double RateAt(double ceiling)
    {
        Span<double> sums = stackalloc double[_capacity.Length];
        sums.Clear();
        Sum(_conductive, 1, sums);
        Sum(_radiative, 4 * ceiling * ceiling * ceiling, sums);
        double rate = 0;
        for (int i = 0; i < sums.Length; i++)
        {
            rate = Math.Max(rate, sums[i] * _inverseCapacity[i]);
        }

        return rate;
    }

    private static void Sum(ThermalLink[] links, double slope, Span<double> sums)
    {
        foreach (ref readonly ThermalLink link in links.AsSpan())
        {
            sums[link.A] += link.Strength * slope;
            sums[link.B] += link.Strength * slope;
        }
    }
}
