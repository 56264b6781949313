namespace LabWatch.Metrology.Cavities;

/// <summary>A piece of one line of the meridian.</summary>
/// <param name="Line">Index of the line.</param>
/// <param name="From">Distance of its start from the start of the line.</param>
/// <param name="To">Distance of its end from the start of the line.</param>
internal readonly record struct Panel(int Line, double From, double To)
{
    public double HalfLength => (To - From) / 2;

    /// <summary>Distance from the start of the line for a local coordinate from -1 to 1.</summary>
    public double T(double u) => From + (To - From) * (0.5 + u / 2);

    /// <summary>Local coordinate for a distance from the start of the line.</summary>
    public double U(double t) => (t - From) / HalfLength - 1;
}
