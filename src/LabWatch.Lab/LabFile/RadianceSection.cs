using LabWatch.Lab.Sources;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.LabFile;

/// <summary>The members of a source that say how its radiance is seen and what a drift of its effective emissivity is told from.</summary>
internal static class RadianceSection
{
    private const double LargestMillimetre = 10_000;
    private const double FarthestMillimetre = 100_000;

    public static ApertureView? View(JsonCursor source)
    {
        if (source.Object("view", required: false) is not { } item)
        {
            return null;
        }

        item.OnlyMembers("kind", "spotRadiusMillimetre", "distanceMillimetre");
        ApertureViewKind kind = item.Choice<ApertureViewKind>("kind");
        double spot = item.OptionalNumber("spotRadiusMillimetre", 0.05, LargestMillimetre, kind != ApertureViewKind.Hemispherical) ?? 0;
        double distance = item.OptionalNumber("distanceMillimetre", 1, FarthestMillimetre, kind == ApertureViewKind.Cone) ?? 0;
        return new ApertureView(kind, spot, distance);
    }

    public static EmissivityBaseline Baseline(JsonCursor item)
    {
        item.OnlyMembers("band", "setPointCelsius", "effectiveEmissivity", "standardUncertainty", "from", "at");
        return new EmissivityBaseline(
            item.Id("band"),
            item.Number("setPointCelsius", SourceSection.LowestCelsius, SourceSection.HighestCelsius),
            new Estimate(item.Number("effectiveEmissivity", 0.01, 1.5), item.Number("standardUncertainty", 0, 1)),
            item.Text("from"),
            item.Time("at"));
    }

    public static Estimate Surroundings(JsonCursor source)
    {
        if (source.Object("surroundings", required: false) is not { } item)
        {
            return ReferenceSource.UsualSurroundingsOffsetKelvin;
        }

        item.OnlyMembers("offsetKelvin");
        return item.Estimate("offsetKelvin", -100, 100);
    }

    public static Estimate Drop(JsonCursor source)
    {
        if (source.Object("wellToWallDrop", required: false) is not { } item)
        {
            return ReferenceSource.UsualWellToWallDrop;
        }

        item.OnlyMembers("partOfDifference");
        return item.Estimate("partOfDifference", -0.1, 0.1);
    }
}
