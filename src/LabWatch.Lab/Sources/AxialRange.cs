namespace LabWatch.Lab.Sources;

/// <summary>A part of the axis of a cavity, in millimetres from the aperture plane, both ends included.</summary>
/// <param name="FromMillimetre">End nearest to the aperture.</param>
/// <param name="ToMillimetre">End farthest from the aperture.</param>
public sealed record AxialRange(double FromMillimetre, double ToMillimetre)
{
    /// <summary>Whether a place lies in it.</summary>
    public bool Contains(double millimetre) => millimetre >= FromMillimetre && millimetre <= ToMillimetre;
}
