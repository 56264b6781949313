using LabWatch.Assessments.Profiles;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Criteria.AxialUniformityParts;

/// <summary>How much the wells of the uniform zone differ.</summary>
/// <param name="Wells">The wells compared, from the bottom to the aperture.</param>
/// <param name="Coldest">The coldest; null with fewer than two.</param>
/// <param name="Warmest">The warmest; null with fewer than two.</param>
/// <param name="Difference">Warmest minus coldest, kelvin.</param>
/// <param name="Gradient">Rise towards the bottom by least squares, kelvin per metre.</param>
internal sealed record WellSpread(IReadOnlyList<WellPoint> Wells, WellPoint? Coldest, WellPoint? Warmest, Estimate Difference, Estimate Gradient)
{
    public static WellSpread Of(AxialEvidence evidence)
    {
        List<WellPoint> wells = [.. evidence.Wells.Where(well => evidence.Source.Cavity.UniformZone?.Contains(well.PositionMillimetre) ?? true)];
        if (wells.Count < 2)
        {
            return new(wells, null, null, Estimate.None, Estimate.None);
        }

        WellPoint coldest = wells.MinBy(well => well.Celsius)!, warmest = wells.MaxBy(well => well.Celsius)!;
        if (ReferenceEquals(coldest, warmest))
        {
            warmest = wells[0];
            coldest = wells[1];
        }

        return new(wells, coldest, warmest, Of(coldest, warmest), GradientOf(wells));
    }

    /// <summary>Why there is no difference, as a clause; empty where there is one.</summary>
    public IEnumerable<string> Obstacles()
    {
        if (Wells.Count < 2)
        {
            yield return Wells.Count == 0
                ? "no well in the uniform zone gives a temperature, and two are needed"
                : $"only {Wells[0].Channel.Id} gives a temperature in the uniform zone, and two wells are needed";
        }
    }

    private static Estimate Of(WellPoint coldest, WellPoint warmest)
    {
        double u = double.Hypot(coldest.StandardUncertainty, warmest.StandardUncertainty);
        double noise = (Math.Pow(coldest.NoiseKelvin, 4) + Math.Pow(warmest.NoiseKelvin, 4)) / (BatchMeans.Parts - 1);
        return new(warmest.Celsius - coldest.Celsius, u, noise > 0 ? Math.Pow(u, 4) / noise : double.PositiveInfinity);
    }

    private static Estimate GradientOf(List<WellPoint> wells)
    {
        double middle = wells.Average(well => well.PositionMillimetre), squares = wells.Sum(well => Math.Pow(well.PositionMillimetre - middle, 2));
        double slope = 0, variance = 0;
        foreach (WellPoint well in wells)
        {
            double factor = (well.PositionMillimetre - middle) / squares * 1000;
            slope += factor * well.Celsius;
            variance += Math.Pow(factor * well.StandardUncertainty, 2);
        }

        return new(slope, Math.Sqrt(variance));
    }
}
