using LabWatch.Simulator.Radiance;
using LabWatch.Simulator.Thermal;

namespace LabWatch.Tests.Simulator;

public sealed class RadianceTests
{
    // Source: Planck's law with exact SI constants, independent evaluation with 50 digits.
    [Theory]
    [InlineData(-50, 11.79594055326531774845515020445458)]
    [InlineData(-20, 23.82468498914029099319696161135245)]
    [InlineData(0, 35.15196196805016821461416294019375)]
    [InlineData(23, 51.76430970121050322319933411162781)]
    [InlineData(50, 76.3863816451603097763476897855231)]
    [InlineData(100, 136.7783390936085769372571483969556)]
    public void At_EightToFourteenMicrometres_IsTheIntegralOfPlancksLaw(double celsius, double expected) =>
        Assert.Equal(expected, new BandRadiance(8, 14).At(celsius + 273.15), 1e-7 * expected);

    // Source: closed-form inverse of Planck's law, independent evaluation with 50 digits.
    [Theory]
    [InlineData(0.9, 3894772.27707, 900)]
    [InlineData(0.9, 68148581656.9, 2000)]
    [InlineData(1.6, 2.86739568097, 310)]
    public void Invert_OneWavelength_GivesTheRadianceTemperature(double micrometre, double radiance, double expected) =>
        Assert.Equal(expected, new BandRadiance(micrometre, micrometre).Invert(radiance, 1000), 1e-6);

    [Theory]
    [InlineData(8, 14, 253)]
    [InlineData(3, 5, 773)]
    [InlineData(0.9, 0.9, 1773)]
    public void Invert_RadianceOfATemperature_GivesItBack(double lower, double upper, double kelvin)
    {
        BandRadiance band = new(lower, upper);
        Assert.Equal(kelvin, band.Invert(band.At(kelvin), 600), 1e-7);
    }

    // Source: coaxial parallel discs of equal radius at a distance of one radius, (3 - sqrt 5)/2 (Incropera and DeWitt, table 13.2, evaluated).
    [Fact]
    public void DiscToDisc_OneRadiusApart_IsTheTableValue() =>
        Assert.Equal((3 - Math.Sqrt(5)) / 2, CylinderExchange.DiscToDisc(1, 1, 1), 1e-12);

    [Theory]
    [InlineData(30, 180, 25)]
    [InlineData(20, 250, 14)]
    [InlineData(20, 120, 20)]
    public void ExchangeAreas_OfEveryElement_SumToItsArea(double radius, double length, double aperture)
    {
        CylinderExchange exchange = new(radius, length, aperture, 10);
        double bottom = exchange.BottomToAperture + exchange.BottomToPlate;
        for (int i = 0; i < 10; i++)
        {
            double sum = exchange.RingToBottom(i) + exchange.RingToAperture(i) + exchange.RingToPlate(i);
            for (int j = 0; j < 10; j++)
            {
                Assert.True(exchange.RingToRing(i, j) > 0);
                sum += exchange.RingToRing(i, j);
            }

            Assert.Equal(exchange.RingArea, sum, 1e-10 * exchange.RingArea);
            bottom += exchange.RingToBottom(i);
        }

        Assert.Equal(exchange.BottomArea, bottom, 1e-10 * exchange.BottomArea);
    }

    // Source: diffuse cylinder with flat bottom, beam over the whole bottom: integral equation and Monte Carlo, independent computation.
    // Ten rings of constant radiosity are coarse; the simulator needs the right size, not the last digit.
    [Theory]
    [InlineData(8, 0.95, 7.7282020747e-4)]
    [InlineData(8, 0.9, 1.5816808022e-3)]
    [InlineData(6, 0.95, 1.3515653805e-3)]
    public void Evaluate_DiffuseCylinder_IsCloseToTheIntegralEquation(double lengthInRadii, double emissivity, double expected)
    {
        CavityView view = new(new CylinderExchange(1, lengthInRadii, 1, 10), 10, null);
        view.Evaluate(emissivity, 1);
        Assert.Equal(expected, 1 - view.Weights.Sum(), 0.04 * expected);
    }

    [Theory]
    [InlineData(null, 1)]
    [InlineData(null, 0.9)]
    [InlineData(60.0, 0.9)]
    public void Evaluate_AnyCavity_SharesSumToOneAndMirrorsCostEmissivity(double? cone, double diffuse)
    {
        CavityView view = new(new CylinderExchange(25, 200, 20, 10), 10, cone);
        view.Evaluate(0.93, diffuse);
        double shared = view.Weights.Sum() + view.PlateWeight + view.BackgroundWeight;
        double whole = view.Weights.Sum();
        view.Evaluate(0.88, diffuse);

        Assert.Equal(1, shared, 1e-12);
        Assert.True(view.Weights.Sum() < whole);
    }

    // A flat bottom sends its mirror-like reflection straight back out of the aperture: first order (1 - e)(1 - D), common practice, no source.
    [Fact]
    public void Evaluate_FlatBottomWithTenPercentMirror_LosesItsMirroredPart()
    {
        CavityView view = new(new CylinderExchange(1, 6, 1, 10), 10, null);
        view.Evaluate(0.95, 1);
        double diffuse = 1 - view.Weights.Sum();
        view.Evaluate(0.95, 0.9);
        Assert.Equal(0.05 * 0.1, 1 - view.Weights.Sum() - diffuse, 2e-4);
    }
}
