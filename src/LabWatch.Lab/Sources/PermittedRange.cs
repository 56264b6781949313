namespace LabWatch.Lab.Sources;

/// <summary>A range that the uncertainty budget of a source holds for, in the unit of what it is about.</summary>
/// <param name="Minimum">Lowest permitted value.</param>
/// <param name="Maximum">Highest permitted value, above the lowest.</param>
public readonly record struct PermittedRange(double Minimum, double Maximum)
{
    /// <summary>The middle.</summary>
    public double Centre => (Minimum + Maximum) / 2;

    /// <summary>Half of the width.</summary>
    public double HalfWidth => (Maximum - Minimum) / 2;
}
