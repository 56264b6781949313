using LabWatch.Metrology.Cavities;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class HitCountsFormatTests
{
    private static readonly CavityGeometry Cone = new(CavityForm.CylinderOutwardCone, 25, 150, 60, 20);

    public static TheoryData<CavityGeometry, CavityView, double, SecondMaterial> Traces { get; } = new()
    {
        { Cone, CavityView.Cone(700, 8), 1, SecondMaterial.None },
        { Cone, CavityView.Cone(700, 8), 0.9, SecondMaterial.None },
        { Cone, CavityView.Hemispherical, 0.8, SecondMaterial.Plate },
        { new(CavityForm.Sphere, 30, 0, 0, 5), CavityView.Hemispherical, 1, SecondMaterial.None },
        { new(CavityForm.FlatPlate, 50, 0, 0, 50), CavityView.Hemispherical, 1, SecondMaterial.None },
    };

    [Theory]
    [MemberData(nameof(Traces))]
    public void What_is_read_back_gives_the_same_weights_to_the_last_bit(CavityGeometry geometry, CavityView view, double diffuse, SecondMaterial second)
    {
        HitCounts counts = CavityTrace.Run(geometry, view, diffuse, null, second, new MonteCarloOptions(64, 4, 8));
        HitCounts again = HitCountsFormat.Read(HitCountsFormat.Write(counts), geometry)!;
        ZoneWeights one = counts.Weights(0.9, 0.8), other = again.Weights(0.9, 0.8);
        Assert.Equal(one.Weights.ToArray(), other.Weights.ToArray());
        Assert.Equal(one.IsothermalComplement, other.IsothermalComplement);
        Assert.Equal(one.StandardError, other.StandardError);
        Assert.Equal((counts.Method, counts.DiffuseFraction, counts.Depth, counts.Rays, counts.RelativeError), (again.Method, again.DiffuseFraction, again.Depth, again.Rays, again.RelativeError));
    }

    [Fact]
    public void A_change_of_any_byte_and_any_missing_end_is_seen()
    {
        byte[] good = HitCountsFormat.Write(CavityTrace.Run(Cone, CavityView.Beam(5), 0.9, null, SecondMaterial.None, new MonteCarloOptions(8, 2, 2)));
        for (int i = 0; i < good.Length; i += 1 + (i / 97))
        {
            byte[] damaged = [.. good];
            damaged[i] ^= 1;
            Assert.Null(HitCountsFormat.Read(damaged, Cone));
            Assert.Null(HitCountsFormat.Read(good.AsSpan(0, i), Cone));
        }
    }

    [Fact]
    public void Counts_of_a_geometry_with_other_zones_are_foreign() =>
        Assert.Null(HitCountsFormat.Read(
            HitCountsFormat.Write(CavityTrace.Run(Cone, CavityView.Beam(5))), Cone with { Form = CavityForm.Cylinder, Length = 600 }));
}
