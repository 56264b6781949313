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

        item.OnlyMembers("shape", "radiusMillimetre", "lengthMillimetre", "coneHalfAngleDegree", "apertureRadiusMillimetre", "coating", "secondMaterial", "uniformZone");
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

        SecondSurface second = Second(item, shape, aperture < radius);
        return new Cavity(shape, radius, length, halfAngle, aperture, [.. item.Items("coating").Select(coating => Coating(coating, second))])
        {
            SecondMaterial = second,
            UniformZone = Zone(item),
        };
    }

    private static CoatingOptics Coating(JsonCursor item, SecondSurface second)
    {
        item.OnlyMembers("band", "emissivity", "diffuseFraction", "secondEmissivity");
        CoatingOptics optics = new(item.Id("band"), item.Estimate("emissivity", 0.01, 1), item.Estimate("diffuseFraction", 0, 1));
        if (second == SecondSurface.None)
        {
            if (item.Object("secondEmissivity", required: false) is not null)
            {
                item.Report("no-second-material", "The cavity has no second material.", "Name its surfaces in \"secondMaterial\", or remove this member.", "secondEmissivity");
            }

            return optics;
        }

        return optics with { SecondEmissivity = item.Estimate("secondEmissivity", 0.01, 1) };
    }

    private static SecondSurface Second(JsonCursor item, CavityShape shape, bool hasPlate)
    {
        if (item.OptionalText("secondMaterial") is null)
        {
            return SecondSurface.None;
        }

        SecondSurface second = item.Choice<SecondSurface>("secondMaterial");
        if (shape is not (CavityShape.Cylinder or CavityShape.CylinderInwardCone or CavityShape.CylinderOutwardCone))
        {
            item.Report("no-second-material", "Only a cylindrical cavity has a bottom and an aperture plate of their own.", "Remove this member.", "secondMaterial");
        }
        else if ((second is SecondSurface.AperturePlate or SecondSurface.BottomAndAperturePlate) && !hasPlate)
        {
            item.Report("no-plate", "The cavity has no aperture plate: its opening is as wide as the cavity.", "Give apertureRadiusMillimetre, or correct this member.", "secondMaterial");
        }
        else if (second == SecondSurface.None)
        {
            item.Report("unknown-choice", "This names no surface.", "Use one of: bottom, aperture-plate, bottom-and-aperture-plate.", "secondMaterial");
        }

        return second;
    }

    private static AxialRange? Zone(JsonCursor item)
    {
        if (item.Object("uniformZone", required: false) is not { } zone)
        {
            return null;
        }

        zone.OnlyMembers("fromMillimetre", "toMillimetre");
        AxialRange range = new(zone.Number("fromMillimetre", 0, LargestMillimetre), zone.Number("toMillimetre", 0, LargestMillimetre));
        if (range.ToMillimetre <= range.FromMillimetre)
        {
            zone.Report("empty-range", "The zone ends before its start.", "Exchange the two distances or correct them.");
        }

        return range;
    }
}
