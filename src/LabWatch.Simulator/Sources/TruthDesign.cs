namespace LabWatch.Simulator.Sources;

/// <summary>From what the hidden truth of a source is drawn: central values and standard deviations.</summary>
/// <param name="DiffuseFraction">Diffuse fraction of the wall's reflection.</param>
/// <param name="WellToWall">Standard deviation of the well-to-wall drop, as a part of the difference between wall and room.</param>
/// <param name="BackgroundKelvin">How much warmer than the air the surroundings radiate.</param>
/// <param name="AgeingPerYear">Fall of the coating's emissivity in a year.</param>
/// <param name="Emissivity">Emissivity of the coating by band.</param>
internal sealed record TruthDesign(
    double DiffuseFraction, double WellToWall, double BackgroundKelvin, double AgeingPerYear, IReadOnlyDictionary<string, double> Emissivity);
