using LabWatch.Simulator.Thermal;

namespace LabWatch.Simulator.Sources;

/// <summary>The thermal network of one source: ten rings and the bottom of the cavity, heater, bath, three layers of insulation, outer case, aperture lip.</summary>
internal sealed class SourceNetwork
{
    /// <summary>Rings that the cavity wall is cut into.</summary>
    public const int Rings = 10;

    /// <summary>Zero of the Celsius scale, kelvin.</summary>
    public const double ZeroCelsius = 273.15;

    private const double ShutterTransmission = 0.12;
    private const double FrontRings = Rings / 3.0;

    private readonly SourceDesign _design;
    private readonly int _heater = -1;
    private readonly int _fluid = -1;
    private readonly int _air;
    private readonly int _surroundings;
    private readonly int _coolant;
    private readonly int _bridge;
    private readonly int _chiller;
    private readonly int[] _purge;
    private readonly (int Link, double Area)[] _openings;
    private readonly double[] _heatShare = new double[Rings + 1];

    /// <summary>Builds the network with everything at one temperature.</summary>
    public SourceNetwork(SourceDesign design, double celsius)
    {
        _design = design;
        HeatDesign heat = design.Heat;
        double kelvin = celsius + ZeroCelsius;
        ThermalNetworkBuilder builder = new();
        for (int i = 0; i < Rings; i++)
        {
            builder.Node(heat.RingCapacity, kelvin);
        }

        Bottom = builder.Node(heat.BottomCapacity, kelvin);
        _heater = heat.HeaterCapacity > 0 ? builder.Node(heat.HeaterCapacity, kelvin) : -1;
        _fluid = heat.FluidCapacity is { } fluid ? builder.Node(fluid, kelvin) : -1;
        int inner = builder.Node(heat.InsulationCapacity, kelvin);
        int middle = builder.Node(heat.InsulationCapacity, kelvin);
        int outer = builder.Node(heat.InsulationCapacity, kelvin);
        Case = builder.Node(heat.CaseCapacity, kelvin);
        Lip = builder.Node(heat.LipCapacity, kelvin);
        NodeCount = Lip + 1;
        _air = builder.Boundary(kelvin);
        _surroundings = builder.Boundary(kelvin);
        _coolant = builder.Boundary(heat.CoolantCelsius + ZeroCelsius);

        LinkWall(builder, inner);
        builder.Conduct(inner, middle, 4 * heat.InsulationConductance);
        builder.Conduct(middle, outer, 4 * heat.InsulationConductance);
        builder.Conduct(outer, Case, 4 * heat.InsulationConductance);
        builder.Conduct(Case, _air, heat.CaseToRoomConductance);
        builder.Conduct(Case, _coolant, heat.CaseToWaterConductance);
        builder.Conduct(Lip, 0, heat.LipToWallConductance);
        builder.Conduct(Lip, _air, heat.LipToRoomConductance);
        _bridge = builder.Conduct(_fluid >= 0 ? _fluid : _heater >= 0 ? _heater : inner, Case, 0);
        _chiller = builder.Conduct(_fluid >= 0 ? _fluid : Case, _coolant, 0);
        _purge = heat.PurgeFlow > 0 ? [.. Enumerable.Range(0, Rings).Select(ring => builder.Conduct(ring, _air, 0))] : [];
        _openings = LinkRadiation(builder);
        Network = builder.Build();
    }

    /// <summary>The network itself.</summary>
    public ThermalNetwork Network { get; }

    /// <summary>Index of the bottom; the rings are 0 to 9.</summary>
    public int Bottom { get; }

    /// <summary>Index of the outer case.</summary>
    public int Case { get; }

    /// <summary>Index of the aperture lip.</summary>
    public int Lip { get; }

    /// <summary>Number of nodes, boundaries not counted.</summary>
    public int NodeCount { get; }

    /// <summary>Temperature of a node, degree Celsius.</summary>
    public double Celsius(int node) => Network.Temperatures[node] - ZeroCelsius;

    /// <summary>Temperature that the controller's sensor feels, degree Celsius.</summary>
    public double ControlCelsius => Celsius(_fluid >= 0 ? _fluid : 6);

    /// <summary>Wall temperature at a distance from the aperture plane, degree Celsius, linear between the middles of the rings and the bottom.</summary>
    public double WallCelsius(double millimetre)
    {
        double place = (millimetre / _design.Cavity.LengthMillimetre * Rings) - 0.5;
        if (place <= 0)
        {
            return Celsius(0);
        }

        // The bottom lies half a ring behind the middle of the last ring.
        if (place >= Rings - 1)
        {
            double share = Math.Min(1, 2 * (place - (Rings - 1)));
            return Celsius(Rings - 1) + (share * (Celsius(Bottom) - Celsius(Rings - 1)));
        }

        int ring = (int)place;
        return Celsius(ring) + ((place - ring) * (Celsius(ring + 1) - Celsius(ring)));
    }

    /// <summary>Sets the surroundings for the next second.</summary>
    public void SetRoom(double airCelsius, double surroundingsCelsius)
    {
        Network.SetTemperature(_air, airCelsius + ZeroCelsius);
        Network.SetTemperature(_surroundings, surroundingsCelsius + ZeroCelsius);
    }

    /// <summary>Sets what acts on the source for the next second.</summary>
    public void SetPlant(double heaterWatt, bool chillerRuns, double purgeFlow, bool apertureOpen, double bridge)
    {
        HeatDesign heat = _design.Heat;
        if (_heater >= 0)
        {
            Network.SetHeat(_heater, heaterWatt);
        }
        else
        {
            for (int i = 0; i <= Rings; i++)
            {
                Network.SetHeat(i, heaterWatt * _heatShare[i]);
            }
        }

        Network.SetConductance(_chiller, chillerRuns ? heat.ChillerConductance : 0);
        Network.SetConductance(_bridge, bridge);
        foreach (int link in _purge)
        {
            Network.SetConductance(link, purgeFlow * heat.PurgeConductancePerFlow / Rings);
        }

        foreach ((int link, double area) in _openings)
        {
            Network.SetExchangeArea(link, apertureOpen ? area : ShutterTransmission * area);
        }
    }

    private void LinkWall(ThermalNetworkBuilder builder, int insulation)
    {
        HeatDesign heat = _design.Heat;
        double boosted = 1 + heat.FrontBoost;
        double whole = (boosted * FrontRings) + (Rings + 1 - FrontRings);
        for (int i = 0; i <= Rings; i++)
        {
            double front = Math.Clamp(FrontRings - i, 0, 1);
            _heatShare[i] = (1 + (heat.FrontBoost * front)) / whole;
            if (i > 0)
            {
                builder.Conduct(i - 1, i, heat.AxialConductance);
            }

            if (_fluid >= 0)
            {
                builder.Conduct(i, _fluid, heat.FluidToWallConductance);
            }
            else
            {
                builder.Conduct(i, insulation, 4 * heat.InsulationConductance / (Rings + 1));
                if (_heater >= 0)
                {
                    builder.Conduct(_heater, i, heat.HeaterConductance * _heatShare[i]);
                }
            }
        }

        if (_fluid >= 0)
        {
            builder.Conduct(_fluid, insulation, 4 * heat.InsulationConductance);
            builder.Conduct(_heater, _fluid, heat.HeaterConductance);
        }
    }

    private (int Link, double Area)[] LinkRadiation(ThermalNetworkBuilder builder)
    {
        CylinderExchange exchange = Exchange(_design.Cavity);
        List<(int Link, double Area)> openings = [];
        for (int i = 0; i < Rings; i++)
        {
            for (int j = i + 1; j < Rings; j++)
            {
                builder.Radiate(i, j, exchange.RingToRing(i, j));
            }

            builder.Radiate(i, Bottom, exchange.RingToBottom(i));
            builder.Radiate(i, Lip, exchange.RingToPlate(i));
            openings.Add((builder.Radiate(i, _surroundings, exchange.RingToAperture(i)), exchange.RingToAperture(i)));
        }

        builder.Radiate(Bottom, Lip, exchange.BottomToPlate);
        openings.Add((builder.Radiate(Bottom, _surroundings, exchange.BottomToAperture), exchange.BottomToAperture));
        return [.. openings];
    }

    /// <summary>The exchange areas of a cavity's dimensions.</summary>
    public static CylinderExchange Exchange(CavityDesign cavity) =>
        new(cavity.RadiusMillimetre / 1000, cavity.LengthMillimetre / 1000, cavity.ApertureRadiusMillimetre / 1000, Rings);
}
