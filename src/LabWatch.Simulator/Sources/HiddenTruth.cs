using LabWatch.Simulator.Noise;

namespace LabWatch.Simulator.Sources;

/// <summary>What is really the case in a simulated source and stands in no lab file. For trials that compare a finding with the truth.</summary>
/// <param name="DiffuseFraction">Diffuse fraction of the wall's reflection.</param>
/// <param name="WellToWallFraction">Well minus wall, as a part of the difference between wall and room.</param>
/// <param name="BackgroundKelvin">Radiating surroundings minus air temperature.</param>
/// <param name="AgeingPerYear">Fall of the coating's emissivity in a year.</param>
/// <param name="SizeOfSource">Share of what a comparator sees that comes from around the aperture.</param>
/// <param name="Emissivity">Emissivity of the coating by band, at the start.</param>
/// <param name="ErrorKelvin">Error of each temperature channel at the start.</param>
/// <param name="DriftKelvinPerYear">Drift of each temperature channel.</param>
public sealed record HiddenTruth(
    double DiffuseFraction,
    double WellToWallFraction,
    double BackgroundKelvin,
    double AgeingPerYear,
    double SizeOfSource,
    IReadOnlyDictionary<string, double> Emissivity,
    IReadOnlyDictionary<string, double> ErrorKelvin,
    IReadOnlyDictionary<string, double> DriftKelvinPerYear)
{
    internal static HiddenTruth Draw(long seed, SourceDesign design)
    {
        double Draw(string what) => CounterNoise.Gaussian(seed, CounterNoise.Stream(design.Id), CounterNoise.Stream(what));
        TruthDesign about = design.Truth;
        ChannelDesign[] thermometers = [.. design.Channels.Where(channel => channel.ErrorKelvin > 0)];
        return new HiddenTruth(
            Math.Clamp(about.DiffuseFraction + (0.02 * Draw("diffuse")), 0.5, 0.999),
            about.WellToWall * Draw("well-to-wall"),
            about.BackgroundKelvin + (0.3 * Draw("background")),
            about.AgeingPerYear * Math.Exp(0.4 * Draw("ageing")),
            Math.Min(0.005, 4e-4 * Math.Exp(0.5 * Draw("size-of-source"))),
            about.Emissivity.ToDictionary(pair => pair.Key, pair => Math.Min(0.995, pair.Value + (0.006 * Draw("emissivity-" + pair.Key))), StringComparer.Ordinal),
            thermometers.ToDictionary(channel => channel.Id, channel => channel.ErrorKelvin * Draw("error-" + channel.Id), StringComparer.Ordinal),
            thermometers.ToDictionary(channel => channel.Id, channel => channel.DriftKelvinPerYear * Draw("drift-" + channel.Id), StringComparer.Ordinal));
    }
}
