namespace LabWatch.Metrology.Cavities;

/// <summary>The first ray of a view.</summary>
internal sealed class RayStart(CavityView view, CavityGeometry geometry, double top)
{
    // Close to an apex a cone repeats itself at every scale, so any small radius is as good as the limit.
    private const double NearAxis = 1e-9;

    /// <summary>Coordinates of a Sobol point that a start uses.</summary>
    public int Dimensions => view.Kind switch
    {
        CavityViewKind.Axis => 0,
        CavityViewKind.Hemispherical => 3,
        CavityViewKind.Wall => 2,
        _ => 1,
    };

    /// <summary>Places the ray: in the aperture on its way in, or on the wall (true), where it has arrived from a direction.</summary>
    public bool Place(SobolPoints points, out Ray ray)
    {
        ray = new Ray { Line = -1, Z = top, Axial = -1, R = NearAxis };
        switch (view.Kind)
        {
            case CavityViewKind.Beam:
                ray.R = view.Radius * Math.Sqrt(points[0]);
                return false;
            case CavityViewKind.Cone:
                double edge = view.Radius * view.Radius / (view.Radius * view.Radius + view.Distance * view.Distance), square = points[0] * edge;
                (ray.Radial, ray.Axial) = (Math.Sqrt(square), -Math.Sqrt(1 - square));
                ray.R = view.Distance * ray.Radial / -ray.Axial;
                return false;
            case CavityViewKind.Hemispherical:
                ray.R = geometry.ApertureRadius * Math.Sqrt(points[0]);
                double sine = Math.Sqrt(points[1]);
                (double around, double radial) = Math.SinCos(Math.PI * points[2]);
                (ray.Radial, ray.Around, ray.Axial) = (sine * radial, sine * around, -Math.Sqrt(1 - points[1]));
                return false;
            case CavityViewKind.Wall:
                return PlaceOnWall(points, ref ray);
            default:
                return false;
        }
    }

    private bool PlaceOnWall(SobolPoints points, ref Ray ray)
    {
        bool cone = geometry.Form == CavityForm.Cone, sphere = geometry.Form == CavityForm.Sphere;
        ray.Z = view.Position;
        ray.Line = cone || sphere ? 0 : 1;
        ray.R = cone ? view.Position / geometry.Length : sphere ? Math.Sqrt(Math.Max(0, view.Position * (2 - view.Position))) : 1;
        double h = geometry.Length, l = Math.Sqrt(1 + h * h);
        (double normalR, double normalZ) = sphere ? (-ray.R, 1 - ray.Z) : cone ? (-h / l, 1 / l) : (-1, 0);
        // Seen from all directions: it arrives against a direction of the cosine law.
        double cosine = Math.Sqrt(points[0]), sine = Math.Sqrt(1 - points[0]);
        (double around, double along) = Math.SinCos(Math.PI * points[1]);
        ray.Radial = -(cosine * normalR + sine * along * normalZ);
        ray.Axial = -(cosine * normalZ - sine * along * normalR);
        ray.Around = -sine * around;
        return true;
    }
}
