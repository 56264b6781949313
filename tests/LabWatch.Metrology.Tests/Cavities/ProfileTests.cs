using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class ProfileTests
{
    private static readonly CavityGeometry Furnace = new(CavityForm.CylinderOutwardCone, 25, 150, 60, 12.5);

    [Fact]
    public void Profile_passes_through_the_wells_and_stays_between_them()
    {
        double[] positions = [0, 40, 90, 140], wells = [500, 501, 500.5, 497];
        var profile = new AxialProfile(positions);
        Zone[] zones = [.. Enumerable.Range(-20, 200).Select(i => new Zone(CavitySurface.Wall, 1, i / 25.0))];
        double[] kelvin = new double[zones.Length];

        profile.Fill(wells, zones, 25, kelvin);

        for (int i = 0; i < positions.Length; i++) Assert.Equal(wells[i], kelvin[(int)positions[i] + 20], 1e-12);
        Assert.All(kelvin, t => Assert.InRange(t, 497, 501));
        Assert.All(Enumerable.Range(61, 49), i => Assert.True(kelvin[i] <= kelvin[i - 1]));
    }

    [Fact]
    public void One_well_gives_one_temperature_and_falling_positions_are_refused()
    {
        double[] kelvin = new double[2];
        new AxialProfile([10.0]).Fill([300.0], [new Zone(CavitySurface.Wall, 1, 0), new Zone(CavitySurface.Plate, 1, 6)], 25, kelvin);

        Assert.Equal([300.0, 300.0], kelvin);
        Assert.Throws<ArgumentException>(() => new AxialProfile([10.0, 5.0]));
    }

    [Fact]
    public void Nodes_follow_a_gradient_as_closely_as_stated()
    {
        // Source: the ten-cell and continuous values of the reference differ by up to 7e-4 for -5 K; linear nodes have to do better than 3e-5.
        HitCounts counts = CavityTraces.Of(Furnace, CavityView.Beam(5));
        RingKernelSolver solver = CavityTraces.Solver(Furnace);
        foreach ((double micrometre, double t0) in new[] { (0.65, 1273.15), (3.9, 323.15), (10.0, 323.15) })
        {
            RadianceBand band = RadianceBand.At(micrometre);
            double Kelvin(double z) => t0 - 5 * Math.Pow(Math.Clamp(z / 6, 0, 1), 2);
            double nodes = CavityRadiance.Of(counts.Weights(0.7), band, [.. counts.Grid.Zones.Select(zone => Kelvin(zone.Z))], t0).Complement;
            double[] weights = solver.NodeWeights(CavityView.Beam(5), 0.7);
            double exact = counts.Weights(0.7).IsothermalComplement;
            for (int i = 0; i < weights.Length; i++) exact += weights[i] * (1 - band.Radiance(Kelvin(solver.Mesh.Points[i].Z)) / band.Radiance(t0));

            Assert.Equal(exact, nodes, 3e-5);
        }
    }

    [Fact]
    public void Isothermal_cavity_at_the_temperature_of_its_surroundings_is_a_blackbody()
    {
        HitCounts counts = CavityTraces.Of(Furnace, CavityView.Hemispherical);
        RadianceBand band = RadianceBand.Of(8, 14);
        double[] kelvin = [.. counts.Grid.Zones.Select(_ => 310.0)];

        CavityRadiance radiance = CavityRadiance.Of(counts.Weights(0.8), band, kelvin, 310);

        Assert.Equal(310, radiance.RadianceKelvin(band, 310, 310), 1e-9);
        Assert.True(radiance.RadianceKelvin(band, 310, 295) < 310);
    }

    [Fact]
    public void Live_evaluation_allocates_nothing()
    {
        ZoneWeights weights = CavityTraces.Of(Furnace, CavityView.Beam(5)).Weights(0.9);
        RadianceBand band = RadianceBand.Of(8, 14);
        double[] kelvin = [.. weights.Counts.Grid.Zones.Select(zone => 500 - zone.Z)];
        CavityRadiance.Of(weights, band, kelvin, 500);

        long before = GC.GetAllocatedBytesForCurrentThread();
        for (int i = 0; i < 100; i++) CavityRadiance.Of(weights, band, kelvin, 500);

        Assert.Equal(0, GC.GetAllocatedBytesForCurrentThread() - before);
    }

    [Fact]
    public void Grid_over_the_diffuse_fraction_meets_a_trace_between_its_points()
    {
        DiffuseFractionGrid grid = DiffuseFractionGrid.Trace(Furnace, CavityView.Hemispherical, new MonteCarloOptions(2048, 16, 16));
        ZoneWeights between = MonteCarloTracer.Trace(Furnace, CavityView.Hemispherical, 0.82, new MonteCarloOptions(2048, 16, 16, 9)).Weights(0.85);

        (double complement, double slope, double byEmissivity, double error) = grid.At(0.85, 0.82);

        Assert.Equal(between.IsothermalComplement, complement, 4 * double.Hypot(error, between.StandardError) + 0.003 * complement);
        Assert.True(slope > 0);
        Assert.True(byEmissivity < 0);
    }

    [Fact]
    public void A_measured_effective_emissivity_says_little_about_the_wall()
    {
        // Source: u(e_eff) = 5e-4 gives u(e) = 0.04 to 0.15 (common practice, no source).
        HitCounts counts = CavityTraces.Of(Furnace, CavityView.Beam(5));
        double measured = counts.Weights(0.9).IsothermalComplement;

        var sharp = WallEmissivityInterval.Explaining(counts, measured, 1e-5);
        var usual = WallEmissivityInterval.Explaining(counts, measured, 2 * 5e-4);
        var wrong = WallEmissivityInterval.Explaining(counts, 0.2, 1e-3);

        Assert.InRange(0.9, sharp.Lower, sharp.Upper);
        Assert.True(sharp.HasInformation);
        Assert.Equal(1, usual.Upper);
        Assert.InRange((usual.Upper - usual.Lower) / 2, 0.04, 0.2);
        Assert.True(wrong.IsEmpty);
    }
}
