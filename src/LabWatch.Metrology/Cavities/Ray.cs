namespace LabWatch.Metrology.Cavities;

/// <summary>A place in a cavity of revolution, turned to azimuth zero, and a direction of flight in its own frame.</summary>
internal struct Ray
{
    /// <summary>Line of the meridian it lies on; -1 in the aperture.</summary>
    public int Line;

    /// <summary>Distance from the axis.</summary>
    public double R;

    /// <summary>Height above the rim of the bottom.</summary>
    public double Z;

    /// <summary>Radial component of the unit direction.</summary>
    public double Radial;

    /// <summary>Azimuthal component of the unit direction.</summary>
    public double Around;

    /// <summary>Axial component of the unit direction.</summary>
    public double Axial;

    /// <summary>Flies a distance and turns the frame to the azimuth of the new place.</summary>
    public void Fly(double distance)
    {
        double x = R + Radial * distance, y = Around * distance;
        double r = Math.Sqrt(x * x + y * y);
        Z += Axial * distance;
        if (r > 0)
        {
            double cos = x / r, sin = y / r;
            (Radial, Around) = (Radial * cos + Around * sin, Around * cos - Radial * sin);
        }

        R = r;
    }
}
