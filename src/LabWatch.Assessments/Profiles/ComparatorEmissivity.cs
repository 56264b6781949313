using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// The effective emissivity that a comparator's radiance temperature shows. With d the part that the temperature profile takes away and r the
/// reflected part, e_eff = 1 - r - d and L(T_rad) = e_eff L(T_ref) + r L(T_bg); both unknowns follow:
/// e_eff = (L(T_rad) - (1 - d) L(T_bg)) / (L(T_ref) - L(T_bg)). Without a profile (d = 0) this is the isothermal formula
/// (L(T_rad) - L(T_bg)) / (L(T) - L(T_bg)), and with the r that it gives (L(T_rad) - r L(T_bg)) / L(T_ref) is the same number: a coating
/// that has aged changes e_eff and r together, so r must not be taken from the stated coating.
/// </summary>
/// <param name="Point">The comparator.</param>
/// <param name="EffectiveEmissivity">The value for the reference temperature.</param>
/// <param name="Isothermal">The value by the isothermal formula.</param>
/// <param name="RadianceDifferenceKelvin">Radiance temperature shown minus that of the model, kelvin.</param>
public sealed record ComparatorEmissivity(ComparatorPoint Point, Estimate EffectiveEmissivity, double Isothermal, Estimate RadianceDifferenceKelvin)
{
    private const double IceKelvin = 273.15;

    /// <summary>Why the value cannot be judged against a limit, as a clause with numbers: U(e_eff) is larger than the limit. Null where it can.</summary>
    public string? CannotTell(AcceptanceLimit? limit, SurroundingsPoint surroundings)
    {
        ArgumentNullException.ThrowIfNull(surroundings);
        double expanded = CoverageFactor.For(EffectiveEmissivity.DegreesOfFreedom) * EffectiveEmissivity.StandardUncertainty;
        return limit is null || expanded <= limit.Maximum
            ? null
            : $"{Point.Channel.Id} cannot tell: its u(T_rad) of {Quantities.Significant(Point.Celsius.StandardUncertainty)} K at {Quantities.Fixed(Point.Celsius.Value, 2)} degC, against surroundings of "
                + $"{Quantities.Fixed(surroundings.RadianceCelsius.Value, 1)} degC, leaves U(e_eff) = {Quantities.Significant(expanded)}, more than the limit of {VerdictText.Plain(limit.Maximum)}";
    }

    /// <summary>The value; null where the comparator shows no temperature.</summary>
    public static ComparatorEmissivity? Of(BandRadiance radiance, ComparatorPoint point)
    {
        ArgumentNullException.ThrowIfNull(radiance);
        ArgumentNullException.ThrowIfNull(point);
        if (!point.Celsius.HasValue)
        {
            return null;
        }

        Radiated values = radiance.Values;
        double own = values.ReferenceRadiance, around = values.BackgroundRadiance, difference = own - around;
        double kelvin = point.Celsius.Value + IceKelvin, seen = radiance.Model.Radiance.Radiance(kelvin);
        double e = (seen - ((1 - values.Deficit) * around)) / difference;
        double reflected = 1 - values.Deficit - e;
        double own1 = radiance.Model.Radiance.RadianceSlope(kelvin) * point.Celsius.StandardUncertainty / Math.Abs(difference);
        Estimate effective = radiance.Combine(
            e,
            change => ((around * change.Deficit) - (e * change.ReferenceRadiance) - (reflected * change.BackgroundRadiance)) / difference,
            own1,
            point.Celsius.DegreesOfFreedom);
        Estimate shown = radiance.Combine(
            kelvin - values.RadianceKelvin, static change => change.RadianceKelvin, point.Celsius.StandardUncertainty, point.Celsius.DegreesOfFreedom);
        return new(point, effective, (seen - around) / difference, shown);
    }
}
