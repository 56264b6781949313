using LabWatch.Metrology.Cavities;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class CavityPropertyTests
{
    private static readonly CavityGeometry Furnace = new(CavityForm.CylinderOutwardCone, 25, 150, 60, 12.5);

    public static TheoryData<CavityForm, double, double> Shapes => new()
    {
        { CavityForm.Cylinder, 0, 1 },
        { CavityForm.CylinderOutwardCone, 40, 0.5 },
        { CavityForm.CylinderInwardCone, 50, 0.8 },
        { CavityForm.Cone, 0, 0.9 },
        { CavityForm.Sphere, 0, 0.3 },
        { CavityForm.FlatPlate, 0, 1 },
    };

    [Theory]
    [MemberData(nameof(Shapes))]
    public void Isothermal_value_lies_between_the_wall_emissivity_and_one_and_the_weights_are_not_negative(CavityForm form, double halfAngle, double aperture)
    {
        var geometry = new CavityGeometry(form, 1, 3, halfAngle, aperture);
        foreach (double diffuse in new[] { 1, 0.6, 0 })
        {
            HitCounts counts = CavityTrace.Run(geometry, CavityView.Beam(0.2), diffuse, options: new MonteCarloOptions(256));
            foreach (double emissivity in new[] { 0.05, 0.4, 0.8, 0.99, 1 })
            {
                ZoneWeights weights = counts.Weights(emissivity);

                Assert.InRange(weights.Isothermal, emissivity - 1e-12, 1);
                Assert.All(weights.Weights.ToArray(), weight => Assert.InRange(weight, 0, 1));
                Assert.Equal(weights.Isothermal, weights.Weights.ToArray().Sum(), 1e-9);
            }
        }
    }

    [Fact]
    public void Weights_do_not_depend_on_the_unit_of_length()
    {
        var metres = new CavityGeometry(CavityForm.CylinderOutwardCone, 0.025, 0.15, 60, 0.0125);

        double a = CavityTrace.Run(Furnace, CavityView.Beam(5)).Weights(0.9).IsothermalComplement;
        double b = CavityTrace.Run(metres, CavityView.Beam(0.005)).Weights(0.9).IsothermalComplement;

        Assert.Equal(1, a / b, 1e-12);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(7)]
    public void Monte_Carlo_gives_the_same_bits_on_any_number_of_threads(int threads)
    {
        HitCounts one = MonteCarloTracer.Trace(Furnace, CavityView.Hemispherical, 0.7, new MonteCarloOptions(128, 16, 12, 3, 1));
        HitCounts many = MonteCarloTracer.Trace(Furnace, CavityView.Hemispherical, 0.7, new MonteCarloOptions(128, 16, 12, 3, threads));

        Assert.Equal(one.Weights(0.9).IsothermalComplement, many.Weights(0.9).IsothermalComplement);
        for (int order = 0; order < one.Orders.Count; order++) Assert.Equal(one.Hits(order), many.Hits(order));
    }

    [Theory]
    [InlineData(CavityForm.Cylinder, 0)]
    [InlineData(CavityForm.CylinderOutwardCone, 60)]
    [InlineData(CavityForm.CylinderInwardCone, 60)]
    [InlineData(CavityForm.Cone, 0)]
    public void Integral_equation_lies_within_twice_the_stated_standard_error_for_about_95_percent_of_seeds(CavityForm form, double halfAngle)
    {
        var geometry = new CavityGeometry(form, 1, 5, halfAngle, 0.8);
        foreach (CavityView view in new[] { CavityView.Hemispherical, CavityView.Beam(0.3) })
        {
            double exact = CavityTraces.Of(geometry, view).Weights(0.85).IsothermalComplement;
            const int Seeds = 100;
            int inside = Enumerable.Range(0, Seeds).Count(seed =>
            {
                ZoneWeights weights = MonteCarloTracer.Trace(
                    geometry, view, 1, new MonteCarloOptions(64, 16, 12, (ulong)seed), ZoneGrid.Cells(geometry, 1)).Weights(0.85);
                return Math.Abs(weights.IsothermalComplement - exact) <= 2 * weights.StandardError;
            });

            // Student's t with 15 degrees of freedom: 93.6 % inside of two standard errors; of 100 seeds between 86 and 99 in all but one case in a thousand.
            Assert.InRange(inside, 86, 100);
        }
    }

    [Fact]
    public void Monte_Carlo_of_a_diffuse_sphere_meets_the_closed_form()
    {
        var sphere = new CavityGeometry(CavityForm.Sphere, 1, 0, 0, 0.4);
        double exact = CavityTrace.Run(sphere, CavityView.Hemispherical).Weights(0.6).IsothermalComplement;

        ZoneWeights traced = MonteCarloTracer.Trace(sphere, CavityView.Cone(4, 0.2), 1, new MonteCarloOptions(1024)).Weights(0.6);

        Assert.InRange(Math.Abs(traced.IsothermalComplement - exact), 0, Math.Max(4 * traced.StandardError, 1e-12));
    }

    [Fact]
    public void Two_materials_of_one_emissivity_are_one_material()
    {
        HitCounts one = CavityTrace.Run(Furnace, CavityView.Beam(5));
        HitCounts two = CavityTrace.Run(Furnace, CavityView.Beam(5), second: SecondMaterial.Plate | SecondMaterial.Bottom, options: new MonteCarloOptions(Depth: 20));

        Assert.Equal(1, two.Weights(0.8).IsothermalComplement / one.Weights(0.8).IsothermalComplement, 1e-9);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(0.5)]
    public void A_black_plate_darkens_a_cavity_and_both_methods_agree_on_it(double diffuse)
    {
        HitCounts counts = MonteCarloTracer.Trace(Furnace, CavityView.Hemispherical, diffuse, new MonteCarloOptions(512, 16, 16), second: SecondMaterial.Plate);
        ZoneWeights black = counts.Weights(0.8, 1.0), grey = counts.Weights(0.8, 0.3);

        Assert.True(black.IsothermalComplement < grey.IsothermalComplement);
        if (diffuse < 1) return;
        HitCounts exact = new RingKernelSolver(Furnace).Trace(CavityView.Hemispherical, SecondMaterial.Plate, 20);
        Assert.InRange(Math.Abs(grey.IsothermalComplement - exact.Weights(0.8, 0.3).IsothermalComplement), 0, 4 * grey.StandardError);
    }

    [Fact]
    public void Slopes_are_the_change_of_the_weights()
    {
        ZoneWeights at = CavityTrace.Run(Furnace, CavityView.Beam(5)).Weights(0.9);
        ZoneWeights up = at.Counts.Weights(0.9001), down = at.Counts.Weights(0.8999);

        (double[] slopes, double complement) = at.Slopes();

        Assert.Equal((up.IsothermalComplement - down.IsothermalComplement) / 0.0002, complement, Math.Abs(complement) * 1e-6);
        Assert.Equal((up.Weights[3] - down.Weights[3]) / 0.0002, slopes[3], 1e-6);
        Assert.Equal(-complement, slopes.Sum(), 1e-7);
    }

    [Theory]
    [InlineData("axis of a cone with a mirror part")]
    [InlineData("beam wider than the aperture")]
    [InlineData("cone that reaches the aperture")]
    public void What_cannot_be_is_refused(string what)
    {
        Assert.Throws<ArgumentException>(() => what switch
        {
            "axis of a cone with a mirror part" => CavityTrace.Run(Furnace, CavityView.Axis, 0.9),
            "beam wider than the aperture" => CavityTrace.Run(Furnace, CavityView.Beam(13)),
            _ => CavityTrace.Run(new CavityGeometry(CavityForm.CylinderInwardCone, 1, 1, 30, 1), CavityView.Axis),
        });
    }

    [Theory]
    [InlineData(10)]
    [InlineData(20)]
    public void Every_dimension_of_the_Sobol_points_fills_each_interval_once(int bits)
    {
        var random = new Metrology.Statistics.Xoshiro256(5);
        var points = new SobolPoints(ref random);
        int n = 1 << bits;
        bool[][] seen = [.. Enumerable.Range(0, SobolPoints.Dimensions).Select(_ => new bool[n])];
        for (int i = 0; i < n; i++)
        {
            points.Next();
            for (int d = 0; d < SobolPoints.Dimensions; d++) seen[d][(int)(points[d] * n)] = true;
        }

        Assert.All(seen, dimension => Assert.DoesNotContain(false, dimension));
    }
}
