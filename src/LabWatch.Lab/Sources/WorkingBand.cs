namespace LabWatch.Lab.Sources;

/// <summary>A spectral band in which a source is used: one wavelength where both edges are equal, else a uniform response between the edges.</summary>
/// <param name="Id">Id of the band in its source (a slug).</param>
/// <param name="Name">Name for people.</param>
/// <param name="LowerMicrometre">Lower edge in micrometres, positive.</param>
/// <param name="UpperMicrometre">Upper edge in micrometres, not below the lower edge.</param>
public sealed record WorkingBand(string Id, string Name, double LowerMicrometre, double UpperMicrometre);
