using FsCheck.Xunit;
using LabWatch.Metrology.Hazards;
using Xunit;

namespace LabWatch.Metrology.Tests.Hazards;

public sealed class BurnThresholdTests
{
    private static readonly SurfaceMaterial[] FromQuickToSlow =
        [SurfaceMaterial.UncoatedMetal, SurfaceMaterial.CeramicGlassStone, SurfaceMaterial.Plastic, SurfaceMaterial.Wood];

    [Property]
    public bool Longer_contact_never_raises_the_threshold(byte materialDraw, ushort first, ushort second)
    {
        SurfaceMaterial material = Enum.GetValues<SurfaceMaterial>()[materialDraw % 6];
        TimeSpan shorter = TimeSpan.FromSeconds(Math.Min(first, second));
        TimeSpan longer = TimeSpan.FromSeconds(Math.Max(first, second));
        return BurnThreshold.Celsius(material, shorter) >= BurnThreshold.Celsius(material, longer);
    }

    [Property]
    public bool Material_that_conducts_better_has_no_higher_threshold(ushort seconds)
    {
        double[] thresholds = [.. FromQuickToSlow.Select(material => BurnThreshold.Celsius(material, TimeSpan.FromSeconds(seconds)))];
        return thresholds.SequenceEqual(thresholds.Order());
    }

    [Property]
    public bool Unknown_material_has_the_most_careful_threshold(byte materialDraw, ushort seconds)
    {
        TimeSpan contact = TimeSpan.FromSeconds(seconds);
        return BurnThreshold.Celsius(SurfaceMaterial.Unknown, contact)
            <= BurnThreshold.Celsius(Enum.GetValues<SurfaceMaterial>()[materialDraw % 6], contact);
    }

    [Theory]
    [InlineData(SurfaceMaterial.Unknown, null, 48)]
    [InlineData(SurfaceMaterial.Unknown, 1.0, 48)]
    [InlineData(SurfaceMaterial.Unknown, 601.0, 43)]
    [InlineData(SurfaceMaterial.UncoatedMetal, null, 48)]
    [InlineData(SurfaceMaterial.UncoatedMetal, 0.5, 65)]
    [InlineData(SurfaceMaterial.UncoatedMetal, 1.1, 51)]
    [InlineData(SurfaceMaterial.CoatedMetal, 1.0, 65)]
    public void Threshold_is_the_careful_one(SurfaceMaterial material, double? seconds, double expected)
    {
        Assert.Equal(expected, BurnThreshold.Celsius(material, seconds is { } value ? TimeSpan.FromSeconds(value) : null));
    }

    [Theory]
    [InlineData(40.0, 40)]
    [InlineData(60.0, 48)]
    [InlineData(null, 48)]
    public void Laboratory_limit_applies_where_it_is_lower(double? limit, double expected)
    {
        Assert.Equal(expected, BurnThreshold.Celsius(SurfaceMaterial.Unknown, null, limit));
    }
}
