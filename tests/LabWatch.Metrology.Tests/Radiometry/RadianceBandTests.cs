using FsCheck.Xunit;
using LabWatch.Metrology.Radiometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Radiometry;

public sealed class RadianceBandTests
{
    private static readonly (double Lower, double Upper)[] Bands = [(8, 14), (3, 5), (0.8, 1.1), (1.55, 1.65), (0.645, 0.655), (0.2, 100)];

    [Property]
    public bool Table_agrees_with_the_exact_integral(byte bandDraw, ushort draw)
    {
        RadianceBand band = BandOf(bandDraw);
        double kelvin = KelvinOf(draw);
        double exact = BlackbodyIntegral.BandRadiance(band.LowerMicrometre, band.UpperMicrometre, kelvin);
        return Math.Abs((band.Radiance(kelvin) / exact) - 1) < 2e-12;
    }

    [Property]
    public bool Temperature_of_the_exact_radiance_is_the_temperature(byte bandDraw, ushort draw)
    {
        RadianceBand band = BandOf(bandDraw);
        double kelvin = KelvinOf(draw);
        double exact = BlackbodyIntegral.BandRadiance(band.LowerMicrometre, band.UpperMicrometre, kelvin);
        return Math.Abs((band.Temperature(exact) / kelvin) - 1) < 2e-12;
    }

    [Property]
    public bool Slope_is_the_derivative(byte bandDraw, ushort draw)
    {
        RadianceBand band = BandOf(bandDraw);
        double kelvin = KelvinOf(draw);
        double step = kelvin * 1e-4;
        double difference = (BlackbodyIntegral.BandRadiance(band.LowerMicrometre, band.UpperMicrometre, kelvin + step)
            - BlackbodyIntegral.BandRadiance(band.LowerMicrometre, band.UpperMicrometre, kelvin - step)) / (2 * step);
        return Math.Abs((band.RadianceSlope(kelvin) / difference) - 1) < 1e-3;
    }

    [Property]
    public bool Series_agrees_with_an_independent_quadrature(byte bandDraw, ushort draw)
    {
        (double lower, double upper) = Bands[bandDraw % (Bands.Length - 1)];
        double kelvin = Math.Max(KelvinOf(draw), 250);
        const int intervals = 2000;
        double step = (upper - lower) / intervals;
        double sum = PlanckLaw.Radiance(lower, kelvin) + PlanckLaw.Radiance(upper, kelvin);
        for (int i = 1; i < intervals; i++)
        {
            sum += (i % 2 == 1 ? 4 : 2) * PlanckLaw.Radiance(lower + (i * step), kelvin);
        }

        return Math.Abs((sum * step / 3 / BlackbodyIntegral.BandRadiance(lower, upper, kelvin)) - 1) < 1e-9;
    }

    [Theory]
    [InlineData(20)]
    [InlineData(60)]
    [InlineData(8000)]
    public void Temperature_OutsideTheTable_IsStillTheInverse(double kelvin)
    {
        RadianceBand band = RadianceBand.Of(8, 14);

        Assert.Equal(kelvin, band.Temperature(band.Radiance(kelvin)), kelvin * 1e-11);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    [InlineData(double.PositiveInfinity)]
    public void Temperature_OfNoRadiance_IsNaN(double radiance)
    {
        Assert.True(double.IsNaN(RadianceBand.Of(8, 14).Temperature(radiance)));
        Assert.True(double.IsNaN(RadianceBand.At(0.65).Temperature(radiance)));
    }

    [Theory]
    [InlineData(0, 5)]
    [InlineData(5, 3)]
    [InlineData(double.NaN, 5)]
    [InlineData(5, double.NaN)]
    public void Of_ImpossibleEdges_Throws(double lower, double upper)
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => RadianceBand.Of(lower, upper));
    }

    [Fact]
    public void Surroundings_of_the_same_temperature_hide_the_emissivity()
    {
        RadianceTemperature seen = ReflectedSurroundings.Evaluate(RadianceBand.Of(8, 14), 296.15, 0.7, 296.15);

        Assert.Equal(296.15, seen.Kelvin, 1e-9);
        Assert.Equal(0, seen.PerEmissivity, 1e-9);
    }

    [Theory]
    [InlineData(-20, 0.28)]
    [InlineData(50, -0.12)]
    [InlineData(300, -0.96)]
    public void Fall_of_emissivity_by_half_a_percent_shifts_the_8_to_14_um_radiance_temperature(double celsius, double expectedKelvin)
    {
        // Common practice, no source: sizes quoted for surroundings at 23 degC, to two digits.
        RadianceTemperature seen = ReflectedSurroundings.Evaluate(RadianceBand.Of(8, 14), celsius + 273.15, 0.995, 296.15);

        Assert.Equal(expectedKelvin, seen.Kelvin - celsius - 273.15, 0.006);
    }

    [Property]
    public bool Derivatives_agree_with_differences(byte bandDraw, byte temperatureDraw, byte emissivityDraw)
    {
        RadianceBand band = BandOf((byte)(bandDraw % 2));
        double kelvin = 320 + (4.0 * temperatureDraw);
        double emissivity = 0.5 + (0.499 * emissivityDraw / byte.MaxValue);
        RadianceTemperature at = ReflectedSurroundings.Evaluate(band, kelvin, emissivity, 296.15);
        return Close(at.PerSurfaceKelvin, d => ReflectedSurroundings.Evaluate(band, kelvin + d, emissivity, 296.15).Kelvin, 1e-2)
            && Close(at.PerEmissivity, d => ReflectedSurroundings.Evaluate(band, kelvin, emissivity + d, 296.15).Kelvin, 1e-5)
            && Close(at.PerBackgroundKelvin, d => ReflectedSurroundings.Evaluate(band, kelvin, emissivity, 296.15 + d).Kelvin, 1e-2);

        static bool Close(double derivative, Func<double, double> shifted, double step) =>
            Math.Abs(((shifted(step) - shifted(-step)) / (2 * step)) - derivative) < 1e-6 * Math.Max(1, Math.Abs(derivative));
    }

    private static RadianceBand BandOf(byte draw)
    {
        (double lower, double upper) = Bands[draw % Bands.Length];
        return RadianceBand.Of(lower, upper);
    }

    private static double KelvinOf(ushort draw) =>
        RadianceBand.TableMinimumKelvin * Math.Pow(RadianceBand.TableMaximumKelvin / RadianceBand.TableMinimumKelvin, (double)draw / ushort.MaxValue);
}
