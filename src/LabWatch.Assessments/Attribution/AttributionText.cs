using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Attribution;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Attribution;

/// <summary>An attribution in plain words.</summary>
public static class AttributionText
{
    internal static string Of(string basis, IReadOnlyList<ReferenceSource> sources, IReadOnlyList<Observation> observations, AttributionResult? result)
    {
        string who = string.Join(" and ", sources.Select(source => source.Key.Source));
        if (result is null)
        {
            return basis == "change"
                ? $"No comparator has looked into {who} on {DayStretches.LeastReferenceDays} days and again lately at the same set point, so nothing can be said about a change."
                : $"No comparator has been decided on in {who} lately, so nothing can be said.";
        }

        int bands = observations.Where(one => one.Channel.Length > 0).Select(one => one.Deviation.Band).Distinct().Count();
        string seen = $"{Quantities.Count(observations.Count(one => one.Channel.Length > 0))} deviation{(observations.Count == 1 ? string.Empty : "s")} in {(bands == 1 ? "one band" : $"{Quantities.Count(bands)} bands")}";
        string from = basis == "change" ? "from the same comparators on the reference days" : "from the model of the cavity";
        return result.Verdict switch
        {
            AttributionVerdict.NothingToExplain => $"Nothing to explain: {seen} {from} are as large as chance makes them.",
            AttributionVerdict.Explained => $"Explained, from {seen} {from}, by {Sizes(result)}. Sizes hold to first order and with the optics as stated.",
            AttributionVerdict.CannotBeToldApart => $"Cannot be told apart: {seen} {from} show that something is there, and it may be {Listed(result.Suspects)}.{OneBand(bands)}",
            _ => $"Not explained: no candidate, alone or with another, fits {seen} {from}. Something else is at work, or an uncertainty is stated too small.",
        };
    }

    /// <summary>The measurements that would tell the suspects apart.</summary>
    internal static IEnumerable<string> WouldSeparate(AttributionResult result)
    {
        if (result.Verdict is not AttributionVerdict.CannotBeToldApart)
        {
            yield break;
        }

        bool Has(CauseKind kind) => result.Suspects.Any(cause => cause.Kind == kind);
        if (Has(CauseKind.ThermometerError) && Has(CauseKind.Gradient))
        {
            yield return "A second calibrated thermometer in the reference well, or an axial probe, tells the thermometer from a gradient.";
        }

        if (Has(CauseKind.ComparatorDrift) && Has(CauseKind.OneBandAbsorption))
        {
            yield return "The same comparator on another source, or on a fixed point, tells its drift from absorption, window or purge of this source.";
        }

        if (Has(CauseKind.CoatingEmissivity) && (Has(CauseKind.ThermometerError) || Has(CauseKind.Gradient)))
        {
            yield return "A second band of another wavelength, or a set point far from this one, tells the coating from the temperature: the first grows with the wavelength and with the square of the temperature.";
        }

        if (Has(CauseKind.CoatingEmissivity) && (Has(CauseKind.ComparatorDrift) || Has(CauseKind.OneBandAbsorption)))
        {
            yield return "Another comparator in the same band, or a set point near room temperature, where the coating shows nothing and the comparator does, tells the coating from one band alone.";
        }

        if (Has(CauseKind.ThermometerError) && (Has(CauseKind.ComparatorDrift) || Has(CauseKind.OneBandAbsorption)))
        {
            yield return "An ice-point or triple-point check of the thermometer, or a second band, tells the thermometer from one band alone.";
        }
    }

    /// <summary>A cause in words.</summary>
    public static string NameOf(Cause cause)
    {
        ArgumentNullException.ThrowIfNull(cause);
        return cause.Kind switch
        {
            CauseKind.ThermometerError => $"an error of the thermometer of {cause.Subject}",
            CauseKind.CoatingEmissivity => $"a change of the coating's emissivity of {cause.Subject}",
            CauseKind.Gradient => $"a gradient near the bottom of {cause.Subject}",
            CauseKind.ComparatorDrift => $"a drift of the comparator {cause.Subject} in {cause.Band}",
            _ => $"absorption, window or purge of {cause.Subject} in {cause.Band}",
        };
    }

    private static string OneBand(int bands) => bands == 1 ? " One band alone can hardly separate them." : string.Empty;

    private static string Sizes(AttributionResult result)
    {
        CauseModel model = result.Models.First(candidate => candidate.Causes.Count == result.Suspects.Count && result.Suspects.All(candidate.Causes.Contains));
        return string.Join(" and ", model.Causes.Select((cause, i) => i < model.Sizes.Count ? $"{NameOf(cause)} of {Size(cause.Kind, model.Sizes[i])}" : NameOf(cause)))
            + $", with a probability of {Quantities.Percent(result.Suspects.Min(cause => result.Inclusion.First(item => item.Cause == cause).Probability))}";
    }

    private static string Size(CauseKind kind, Estimate size)
    {
        double expanded = CoverageFactor.For(size.DegreesOfFreedom) * size.StandardUncertainty;
        string unit = kind switch
        {
            CauseKind.ThermometerError or CauseKind.Gradient => " K",
            CauseKind.CoatingEmissivity => string.Empty,
            _ => " of the signal",
        };
        return $"{(size.Value > 0 ? "+" : string.Empty)}{Quantities.Value(size.Value, expanded)}{unit} (U = {Quantities.Significant(expanded)})";
    }

    private static string Listed(IReadOnlyList<Cause> causes) => string.Join(", or ", causes.Select(NameOf));
}
