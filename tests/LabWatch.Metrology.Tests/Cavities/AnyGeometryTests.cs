using LabWatch.Metrology.Cavities;
using Xunit;

namespace LabWatch.Metrology.Tests.Cavities;

/// <summary>Forms, lengths, angles, apertures, views and emissivities drawn at random, from a fixed seed for each case.</summary>
public sealed class AnyGeometryTests
{
    private static readonly CavityForm[] Forms =
        [CavityForm.Cylinder, CavityForm.CylinderInwardCone, CavityForm.CylinderOutwardCone, CavityForm.Cone, CavityForm.Sphere];

    public static TheoryData<int> Seeds => [.. Enumerable.Range(1, 40)];

    [Theory]
    [MemberData(nameof(Seeds))]
    public void Both_methods_agree_and_the_weights_add_up(int seed)
    {
        var random = new Random(seed);
        if (Draw(random) is not { } geometry) return;
        CavityView view = View(geometry, random);
        double emissivity = 0.1 + 0.89 * random.NextDouble();

        ZoneWeights exact = CavityTrace.Run(geometry, view).Weights(emissivity);
        ZoneWeights traced = MonteCarloTracer.Trace(geometry, view, 1, new MonteCarloOptions(256, 16, 32, (ulong)seed)).Weights(emissivity);

        Assert.InRange(exact.Isothermal, emissivity - 1e-9, 1);
        Assert.All(exact.Weights.ToArray(), weight => Assert.InRange(weight, -1e-9, 1));
        Assert.Equal(1, exact.IsothermalComplement + exact.Weights.ToArray().Sum(), 1e-5);
        Assert.InRange(Math.Abs(traced.IsothermalComplement - exact.IsothermalComplement), 0, Math.Max(5 * traced.StandardError, 1e-9 * exact.IsothermalComplement));
    }

    /// <summary>A geometry; null where the draw is impossible, as a re-entrant cone that is longer than its cylinder.</summary>
    private static CavityGeometry? Draw(Random random)
    {
        CavityForm form = Forms[random.Next(Forms.Length)];
        double length = Math.Exp(random.NextDouble() * 5 - 2.5), aperture = random.Next(3) == 0 ? 1 : Math.Exp(-3 * random.NextDouble());
        var geometry = new CavityGeometry(form, 1, length, 10 + 75 * random.NextDouble(), form == CavityForm.Sphere ? Math.Min(aperture, 0.9) : aperture);
        return geometry.Problems().Count == 0 ? geometry : null;
    }

    private static CavityView View(CavityGeometry geometry, Random random) => random.Next(3) switch
    {
        0 => CavityView.Hemispherical,
        1 => CavityView.Beam(geometry.ApertureRadius * (0.05 + 0.95 * random.NextDouble())),
        _ => CavityView.Cone(0.2 + 10 * random.NextDouble(), geometry.ApertureRadius * (0.05 + 0.95 * random.NextDouble())),
    };
}
