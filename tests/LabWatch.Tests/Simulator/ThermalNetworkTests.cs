using LabWatch.Simulator.Sources;
using LabWatch.Simulator.Thermal;

namespace LabWatch.Tests.Simulator;

/// <summary>
/// The network against closed forms of Incropera and DeWitt, Fundamentals of Heat and Mass Transfer, 6th edition. The equation numbers are from memory;
/// the formulas themselves are in every textbook of heat transfer.
/// </summary>
public sealed class ThermalNetworkTests
{
    // Source: Incropera and DeWitt, eq. 3.27 (radial conduction through a cylinder).
    [Fact]
    public void Advance_HollowCylinder_SettlesAtTheLogarithmicLaw()
    {
        const double inner = 0.02, outer = 0.08, length = 0.3, conductivity = 0.35;
        const int shells = 60;
        double width = (outer - inner) / shells;
        ThermalNetworkBuilder builder = new();
        int hot = builder.Boundary(600);
        int cold = builder.Boundary(300);
        int previous = hot;
        for (int i = 0; i < shells; i++)
        {
            int node = builder.Node(2, 300);
            double gap = i == 0 ? width / 2 : width;
            double radius = inner + (i * width) + (i == 0 ? width / 4 : 0);
            builder.Conduct(previous, node, 2 * Math.PI * radius * length * conductivity / gap);
            previous = node;
        }

        builder.Conduct(previous, cold, 2 * Math.PI * (outer - (width / 4)) * length * conductivity / (width / 2));
        ThermalNetwork network = builder.Build();
        network.Advance(3600);
        network.Advance(3600);
        double before = network.ReceivedJoule(cold);
        network.Advance(100);

        double expected = 2 * Math.PI * length * conductivity * 300 / Math.Log(outer / inner);
        Assert.Equal(expected, (network.ReceivedJoule(cold) - before) / 100, 1e-3 * expected);
    }

    // Source: Incropera and DeWitt, eq. 13.19 and 13.24 (two-surface enclosure, radiation shield): a thin black shield between black plates.
    [Fact]
    public void Advance_RadiationShield_SettlesAtTheMeanOfFourthPowers()
    {
        ThermalNetworkBuilder builder = new();
        int hot = builder.Boundary(1200);
        int cold = builder.Boundary(400);
        int shield = builder.Node(50, 400);
        builder.Radiate(hot, shield, 0.01);
        builder.Radiate(shield, cold, 0.01);
        ThermalNetwork network = builder.Build();
        network.Advance(3600);
        double before = network.ReceivedJoule(cold);
        network.Advance(60);

        double mean = (Math.Pow(1200, 4) + Math.Pow(400, 4)) / 2;
        Assert.Equal(Math.Pow(mean, 0.25), network.Temperatures[shield], 1e-6);
        double expected = ThermalNetwork.StefanBoltzmann * 0.01 * (mean - Math.Pow(400, 4));
        Assert.Equal(expected, (network.ReceivedJoule(cold) - before) / 60, 1e-8 * expected);
    }

    // Source: Incropera and DeWitt, eq. 5.6 (lumped capacitance).
    [Theory]
    [InlineData(10)]
    [InlineData(60)]
    [InlineData(300)]
    public void Advance_LumpedBody_FollowsTheExponential(double seconds)
    {
        ThermalNetworkBuilder builder = new();
        int air = builder.Boundary(293);
        int body = builder.Node(400, 393);
        builder.Conduct(body, air, 4);
        ThermalNetwork network = builder.Build();
        network.Advance(seconds);

        Assert.Equal(293 + (100 * Math.Exp(-seconds / 100)), network.Temperatures[body], 1e-3);
    }

    // Source: Incropera and DeWitt, eq. 5.19 (radiation to deep space).
    [Fact]
    public void Advance_BodyThatRadiatesToNothing_FollowsTheCubicLaw()
    {
        ThermalNetworkBuilder builder = new();
        int space = builder.Boundary(0);
        int body = builder.Node(200, 1500);
        builder.Radiate(body, space, 0.005);
        ThermalNetwork network = builder.Build();
        network.Advance(600);

        double slope = 3 * ThermalNetwork.StefanBoltzmann * 0.005 * 600 / 200;
        Assert.Equal(Math.Pow(Math.Pow(1500, -3) + slope, -1.0 / 3), network.Temperatures[body], 1e-2);
    }

    [Theory]
    [InlineData(0.1)]
    [InlineData(1)]
    [InlineData(7.3)]
    [InlineData(60)]
    [InlineData(3600)]
    public void Advance_AnyPermittedStep_StaysBetweenTheBoundariesAndReachesTheSameState(double step)
    {
        // Stiff on purpose: a node of 0.05 J/K between strong links has a time constant of 2 ms.
        ThermalNetworkBuilder builder = new();
        int hot = builder.Boundary(1800);
        int cold = builder.Boundary(290);
        int light = builder.Node(0.05, 290);
        int heavy = builder.Node(5, 290);
        builder.Conduct(hot, light, 15);
        builder.Conduct(light, heavy, 10);
        builder.Radiate(heavy, cold, 0.02);
        ThermalNetwork network = builder.Build();
        double reached = 0;
        while (reached < 60)
        {
            network.Advance(step);
            reached += step;
            Assert.All(network.Temperatures.ToArray(), kelvin => Assert.InRange(kelvin, 290 - 1e-9, 1800 + 1e-9));
        }

        double series = 1 / ((1.0 / 15) + (1.0 / 10));
        double outOf = ThermalNetwork.StefanBoltzmann * 0.02 * (Math.Pow(network.Temperatures[heavy], 4) - Math.Pow(290, 4));
        Assert.Equal(series * (1800 - network.Temperatures[heavy]), outOf, 1e-6 * outOf);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(3600.1)]
    [InlineData(double.NaN)]
    public void Advance_StepOutsideTheRange_Throws(double step) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => new ThermalNetworkBuilder().Build().Advance(step));

    [Fact]
    public void Advance_TenSeconds_IsBitForBitTenTimesOne()
    {
        SourceNetwork once = new(DemoSource("yew"), 800);
        SourceNetwork often = new(DemoSource("yew"), 800);
        once.SetPlant(2500, false, 4, true, 0);
        often.SetPlant(2500, false, 4, true, 0);
        once.Network.Advance(10);
        for (int i = 0; i < 10; i++)
        {
            often.Network.Advance(1);
        }

        Assert.Equal(once.Network.Temperatures.ToArray(), often.Network.Temperatures.ToArray());
    }

    [Theory]
    [InlineData("fir")]
    [InlineData("rowan")]
    [InlineData("yew")]
    [InlineData("hazel")]
    public void Advance_EverySource_StoresWhatHeaterAndBoundariesBroughtIn(string source)
    {
        SourceNetwork network = new(DemoSource(source), 120);
        double[] before = network.Network.Temperatures.ToArray();
        Random random = new(7);
        double exchanged = 0;
        for (int i = 0; i < 1500; i++)
        {
            double watt = 3000 * random.NextDouble();
            network.SetRoom(15 + (10 * random.NextDouble()), 20);
            network.SetPlant(watt, i % 300 < 100, 5 * random.NextDouble(), i % 200 < 150, i % 500 < 250 ? 0 : 4);
            double step = 0.5 + (9 * random.NextDouble());
            network.Network.Advance(step);
            exchanged += watt * step;
        }

        double flowedOut = 0;
        for (int i = network.NodeCount; i < before.Length; i++)
        {
            flowedOut += network.Network.ReceivedJoule(i);
        }

        Assert.Equal(exchanged, network.Network.SuppliedJoule, 1e-9 * exchanged);
        Assert.Equal(network.Network.SuppliedJoule - flowedOut, network.Network.StoredAbove(before), 1e-9 * exchanged);
    }

    private static SourceDesign DemoSource(string id) => LabWatch.Simulator.DemoLab.Designs.First(design => design.Id == id);
}
