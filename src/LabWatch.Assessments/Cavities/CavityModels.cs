using System.Collections.Concurrent;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Cavities;

/// <summary>
/// Cavity models, each made once from the traces at the stated diffuse fraction and at both ends of its standard uncertainty.
/// </summary>
internal sealed class CavityModels(CavityTraces traces) : ICavityModels
{
    private readonly ConcurrentDictionary<Key, Lazy<BandModel>> _models = new();

    /// <inheritdoc/>
    public BandModel ModelOf(ReferenceSource source, WorkingBand band)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(band);
        CoatingOptics? optics = source.Cavity.Coating.FirstOrDefault(coating => string.Equals(coating.Band, band.Id, StringComparison.Ordinal));
        Key key = new(CavityDescription.Of(source), optics, band);
        return _models.GetOrAdd(key, static (wanted, self) => new(() => self.Make(wanted)), this).Value;
    }

    private BandModel Make(Key key)
    {
        RadianceBand radiance = RadianceBand.Of(key.Band.LowerMicrometre, key.Band.UpperMicrometre);
        IReadOnlyList<string> problems = key.Optics is null ? [$"No coating emissivity is stated for the band {key.Band.Id}."] : key.Cavity.Problems();
        if (key.Optics is not { } optics || problems.Count > 0)
        {
            return new(key.Band, radiance, key.Cavity, key.Optics ?? new(key.Band.Id, Estimate.None, Estimate.None), null, [], problems);
        }

        Estimate emissivity = optics.Emissivity, diffuse = optics.DiffuseFraction;
        double second = optics.SecondEmissivity?.Value ?? emissivity.Value;
        HitCounts counts = Counts(key.Cavity, diffuse.Value);
        List<OpticsSide> sides = [.. Side("emissivity", emissivity, value => counts.Weights(value, optics.SecondEmissivity is null ? value : second), 1e-3)];
        if (optics.SecondEmissivity is { } other)
        {
            sides.AddRange(Side("second-emissivity", other, value => counts.Weights(emissivity.Value, value), 1e-3));
        }

        if (key.Cavity.Geometry.Form != CavityForm.FlatPlate)
        {
            sides.AddRange(Side("diffuse-fraction", diffuse, value => Counts(key.Cavity, value).Weights(emissivity.Value, second), 0));
        }

        return new(key.Band, radiance, key.Cavity, optics, counts.Weights(emissivity.Value, second), sides, []);
    }

    /// <summary>Both ends of a property's standard uncertainty, inside of what is possible; nothing where it is exactly known.</summary>
    private static IEnumerable<OpticsSide> Side(string name, Estimate property, Func<double, ZoneWeights> weights, double least)
    {
        double low = Math.Max(least, property.Value - property.StandardUncertainty), high = Math.Min(1, property.Value + property.StandardUncertainty);
        if (property.StandardUncertainty > 0 && high > low)
        {
            yield return new(name, weights(low), weights(high), high - low, property.StandardUncertainty);
        }
    }

    private HitCounts Counts(CavityDescription cavity, double diffuseFraction) => traces.Of(new(cavity.Geometry, cavity.View, diffuseFraction, cavity.Second));

    private sealed record Key(CavityDescription Cavity, CoatingOptics? Optics, WorkingBand Band);
}
