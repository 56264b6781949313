using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>cavity</c> of a source.</summary>
internal static class CavitySection
{
    private const double LargestMillimetre = 10_000;

    public static Cavity Read(JsonCursor source)
    {
        if (source.Object("cavity") is not { } item)
        {
            return new Cavity(CavityShape.FlatPlate, double.NaN, 0, null, double.NaN, []);
        }

        item.OnlyMembers("shape", "radiusMillimetre", "lengthMillimetre", "coneHalfAngleDegree", "apertureRadiusMillimetre", "coating");
        CavityShape shape = item.Choice<CavityShape>("shape");
        bool hasLength = shape is not (CavityShape.Sphere or CavityShape.FlatPlate);
        bool hasCone = shape is CavityShape.CylinderInwardCone or CavityShape.CylinderOutwardCone;
        double radius = item.Number("radiusMillimetre", 0.1, LargestMillimetre);
        double length = item.OptionalNumber("lengthMillimetre", 0, LargestMillimetre, hasLength) ?? 0;
        double? halfAngle = item.OptionalNumber("coneHalfAngleDegree", 5, 89, hasCone);
        double aperture = item.OptionalNumber("apertureRadiusMillimetre", 0.05, LargestMillimetre) ?? radius;
        if (aperture > radius)
        {
            item.Report("aperture-too-wide", "The aperture is wider than the cavity.", "Correct one of the two radii.", "apertureRadiusMillimetre");
        }

        if (shape == CavityShape.CylinderInwardCone && halfAngle is { } angle && radius / Math.Tan(double.DegreesToRadians(angle)) >= length)
        {
            item.Report("cone-too-long", "The re-entrant cone reaches the aperture.", "Correct the half-angle, the radius or the length.", "coneHalfAngleDegree");
        }

        return new Cavity(shape, radius, length, halfAngle, aperture, [.. item.Items("coating").Select(Coating)]);
    }

    private static CoatingOptics Coating(JsonCursor item)
    {
        item.OnlyMembers("band", "emissivity", "diffuseFraction");
        return new CoatingOptics(item.Id("band"), item.Estimate("emissivity", 0.01, 1), item.Estimate("diffuseFraction", 0, 1));
    }
}
