using LabWatch.Assessments.Cavities;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>The radiance of a source in one band, with its uncertainty.</summary>
/// <param name="Model">The cavity model.</param>
/// <param name="Evidence">The temperatures.</param>
/// <param name="Values">Best estimates.</param>
/// <param name="Contributions">What each input adds to the uncertainty.</param>
public sealed record BandRadiance(BandModel Model, AxialEvidence Evidence, Radiated Values, IReadOnlyList<Contribution> Contributions)
{
    private const double IceKelvin = 273.15;

    /// <summary>Effective emissivity for the reference temperature, with the live profile.</summary>
    public Estimate EffectiveEmissivity => Combine(Values.EffectiveEmissivity, static change => change.EffectiveEmissivity);

    /// <summary>Effective emissivity of the same cavity without temperature differences.</summary>
    public Estimate Isothermal => Combine(Values.Isothermal, static change => change.Isothermal);

    /// <summary>What the profile adds to the effective emissivity (negative where the wall is colder than the reference).</summary>
    public Estimate ProfileEffect => Combine(-Values.Deficit, static change => -change.Deficit);

    /// <summary>Radiance temperature with the surroundings, degree Celsius.</summary>
    public Estimate RadianceCelsius => Combine(Values.RadianceKelvin - IceKelvin, static change => change.RadianceKelvin);

    /// <summary>Radiance temperature minus reference temperature, kelvin.</summary>
    public Estimate OffsetKelvin => Combine(Values.OffsetKelvin, static change => change.OffsetKelvin);

    /// <summary>What the profile adds to the radiance temperature, kelvin.</summary>
    public Estimate ProfileEffectKelvin
    {
        get
        {
            // dT = -deficit L(T_ref) / (dL/dT at T_rad): first order, because the deficit is small.
            double slope = Values.ReferenceRadiance / Model.Radiance.RadianceSlope(Values.RadianceKelvin);
            return Combine(-Values.Deficit * slope, change => -change.Deficit * slope);
        }
    }

    /// <summary>Part of the surroundings' radiance that the cavity reflects.</summary>
    public double ReflectedPart => 1 - Values.Isothermal;

    /// <summary>Standard uncertainty that one kind of input adds to the effective emissivity.</summary>
    public double Part(ContributionKind kind)
    {
        double squares = 0;
        foreach (Contribution contribution in Contributions)
        {
            double change = contribution.Change.EffectiveEmissivity;
            squares += contribution.Input == kind ? change * change : 0;
        }

        return Math.Sqrt(squares);
    }

    /// <summary>
    /// Combines the contributions (JCGM 100:2008, 5.1.2 and G.4.1). How far the errors of the wells are alike is on no certificate: independent
    /// (root sum of squares) and fully alike (plain sum) are both computed and the larger counts. All other inputs are independent.
    /// </summary>
    internal Estimate Combine(double value, Func<Radiated, double> of, double more = 0, double moreDegreesOfFreedom = double.PositiveInfinity)
    {
        double squares = more * more, wells = 0, alike = 0, noise = more > 0 ? Math.Pow(more, 4) / moreDegreesOfFreedom : 0;
        foreach (Contribution contribution in Contributions)
        {
            double change = of(contribution.Change);
            if (contribution.Input == ContributionKind.Well)
            {
                wells += change * change;
                alike += change;
            }
            else
            {
                squares += change * change;
            }

            noise += Math.Pow(change * contribution.NoisePart, 4) / (BatchMeans.Parts - 1);
        }

        double variance = squares + Math.Max(wells, alike * alike);
        return new(value, Math.Sqrt(variance), noise > 0 ? variance * variance / noise : double.PositiveInfinity);
    }
}
