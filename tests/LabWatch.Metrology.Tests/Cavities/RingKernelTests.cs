using LabWatch.Metrology.Cavities;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class RingKernelTests
{
    // Source: H. Buckley, Phil. Mag. 6 (1928) 447-457; E. M. Sparrow and L. U. Albers, J. Heat Transfer 82 (1960) 253-255 (from memory): exact for an endless tube.
    [Theory]
    [InlineData(0.3, 1e-4)]
    [InlineData(0.5, 1e-7)]
    [InlineData(0.9, 1e-9)]
    public void Lip_of_a_long_tube_has_the_square_root_of_the_wall_emissivity(double emissivity, double tolerance)
    {
        HitCounts counts = CavityTraces.Of(new CavityGeometry(CavityForm.Cylinder, 1, 40, 0, 1), CavityView.Wall(40));

        Assert.Equal(Math.Sqrt(emissivity), counts.Weights(emissivity).Isothermal, tolerance);
    }

    // Source: ring kernel of the cylinder, 1 - |x| (x^2 + 6)/(x^2 + 4)^(3/2), over 2 (Buckley 1928, from memory).
    [Theory]
    [InlineData(0.001)]
    [InlineData(0.3)]
    [InlineData(5)]
    public void Ring_kernel_of_the_cylinder_is_that_of_Buckley(double x)
    {
        var near = new RingPoint(1, 0, -1, 0, Math.PI, 1);
        var far = new RingPoint(1, x, -1, 0, Math.PI, 1);

        double expected = (1 - x * (x * x + 6) / Math.Pow(x * x + 4, 1.5)) / 2;

        Assert.Equal(expected, RingKernel.ToRing(near, far), expected * 1e-9);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(4e-16)]
    [InlineData(1e-9)]
    public void Kernel_is_continuous_where_a_shadow_begins(double shortOfPi)
    {
        double first = 1.9892623609944848, second = Math.PI - first - shortOfPi;
        var x = new RingPoint(1, 6, -1, 0, first, 1);

        double whole = RingKernel.ToRing(x, new RingPoint(1, 2.5, -1, 0, Math.PI, 1));
        double edge = RingKernel.ToRing(x, new RingPoint(1, 2.5, -1, 0, second, 1));

        Assert.Equal(whole, edge, 1e-8 * whole + shortOfPi);
    }

    [Theory]
    [InlineData(CavityForm.Cylinder, 0, 1.0)]
    [InlineData(CavityForm.CylinderOutwardCone, 30, 0.6)]
    [InlineData(CavityForm.CylinderOutwardCone, 75, 1.0)]
    [InlineData(CavityForm.CylinderInwardCone, 45, 0.3)]
    [InlineData(CavityForm.Cone, 0, 1.0)]
    [InlineData(CavityForm.Cone, 0, 0.5)]
    public void View_factors_of_every_place_add_to_one(CavityForm form, double halfAngle, double aperture)
    {
        RingKernelSolver solver = CavityTraces.Solver(new CavityGeometry(form, 1, 4, halfAngle, aperture));

        Assert.InRange(solver.ClosureDefect, 0, form == CavityForm.CylinderInwardCone ? 2e-7 : 1e-10);
    }

    [Theory]
    [InlineData(CavityForm.Cylinder, 0)]
    [InlineData(CavityForm.CylinderOutwardCone, 60)]
    [InlineData(CavityForm.CylinderInwardCone, 60)]
    [InlineData(CavityForm.Cone, 0)]
    public void Four_times_finer_panels_change_less_than_the_stated_error(CavityForm form, double halfAngle)
    {
        var geometry = new CavityGeometry(form, 1, 5, halfAngle, 0.7);
        foreach (CavityView view in new[] { CavityView.Hemispherical, CavityView.Beam(0.3), CavityView.Cone(8, 0.5), CavityView.Axis, CavityView.Wall(2.2) })
        {
            HitCounts counts = CavityTraces.Of(geometry, view);
            double fine = new RingKernelSolver(geometry, ZoneGrid.Cells(geometry, 1), new PanelOptions(14, 1e-4, 0.5, 2)).Trace(view).Weights(0.7).IsothermalComplement;

            Assert.Equal(1, counts.Weights(0.7).IsothermalComplement / fine, counts.RelativeError);
        }
    }

    [Fact]
    public void Radiosity_near_the_apex_of_a_cone_tends_to_the_value_of_the_axis()
    {
        var geometry = new CavityGeometry(CavityForm.Cone, 1, 2, 0, 1);
        double apex = CavityTraces.Of(geometry, CavityView.Axis).Weights(0.8).IsothermalComplement;
        double[] near = [.. new[] { 0.04, 0.02, 0.01 }.Select(z => CavityTraces.Of(geometry, CavityView.Wall(z)).Weights(0.8).IsothermalComplement - apex)];

        // A power of the distance below one: the same ratio at each halving.
        Assert.Equal(near[1] / near[0], near[2] / near[1], 0.02);
        Assert.InRange(near[1] / near[0], 0.5, 0.75);
    }
}
