using FsCheck.Xunit;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class StudentDistributionTests
{
    [Property]
    public bool Tail_of_the_quantile_is_the_probability(ushort tailDraw, ushort freedomDraw)
    {
        double probability = Math.Pow(10, -0.31 - (7.0 * tailDraw / ushort.MaxValue));
        double freedom = Math.Pow(10, -0.3 + (8.0 * freedomDraw / ushort.MaxValue));
        double back = StudentDistribution.UpperTail(StudentDistribution.UpperQuantile(probability, freedom), freedom);
        return Math.Abs((back / probability) - 1) < 1e-9;
    }

    [Theory]
    [InlineData(0.3)]
    [InlineData(2.0)]
    [InlineData(50.0)]
    public void Tail_OneDegreeOfFreedom_IsTheCauchyDistribution(double t)
    {
        Assert.Equal(0.5 - (Math.Atan(t) / Math.PI), StudentDistribution.UpperTail(t, 1), 1e-14);
    }

    [Theory]
    [InlineData(0.3)]
    [InlineData(2.0)]
    [InlineData(50.0)]
    public void Tail_TwoDegreesOfFreedom_IsItsClosedForm(double t)
    {
        double square = t * t;
        Assert.Equal(1 / ((2 + square) * (1 + (t / Math.Sqrt(2 + square)))), StudentDistribution.UpperTail(t, 2), 1e-14);
    }

    [Theory]
    [InlineData(0.5)]
    [InlineData(2.0)]
    [InlineData(5.0)]
    public void Tail_IsContinuousWhereTheMethodChanges(double t)
    {
        double below = StudentDistribution.UpperTail(t, 1e5 * (1 - 1e-12));
        double above = StudentDistribution.UpperTail(t, 1e5 * (1 + 1e-12));

        Assert.Equal(1, below / above, 1e-9);
    }

    [Fact]
    public void UpperQuantile_OfInvalidArguments_IsNaN()
    {
        Assert.True(double.IsNaN(StudentDistribution.UpperQuantile(0.02, 0)));
        Assert.True(double.IsNaN(StudentDistribution.UpperQuantile(0.02, double.NaN)));
        Assert.True(double.IsNaN(StudentDistribution.UpperQuantile(1.1, 5)));
    }
}
