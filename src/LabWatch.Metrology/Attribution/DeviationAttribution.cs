using LabWatch.Metrology.Numerics;

namespace LabWatch.Metrology.Attribution;

/// <summary>
/// Finds what may lie behind deviations of radiance temperature in two or more bands, over one source or jointly over several.
/// </summary>
/// <remarks>
/// Every explanation by no, one or two causes is a linear model with normal priors; its evidence is the normal density of the deviations with the covariance
/// V + X T X' (V of the measurement, T of the priors), its probability that times its prior (R. E. Kass and A. E. Raftery, J. Am. Stat. Assoc. 90 (1995) 773-795).
/// Causes are named that are at work with 95 % probability, if nothing beside them is more probable than not; otherwise the candidates of the most probable
/// explanations that add to 95 % are named together as not to be told apart.
/// </remarks>
public static class DeviationAttribution
{
    private const double Sure = 0.95;
    private const double TooUnlikely = 1e-4;
    private const double Separation = 9; // squared distance of two patterns in standard uncertainties

    /// <summary>Attributes deviations.</summary>
    /// <param name="deviations">Deviations, at least one, at most 64, each with a positive standard uncertainty.</param>
    /// <param name="priors">Priors; the defaults by default.</param>
    /// <param name="covariance">Covariance of the deviations where they share errors; null where they are independent.</param>
    public static AttributionResult Explain(IReadOnlyList<BandDeviation> deviations, CausePriors? priors = null, double[,]? covariance = null)
    {
        ArgumentNullException.ThrowIfNull(deviations);
        if (deviations.Count is 0 or > 64) throw new ArgumentException("One to 64 deviations are needed.", nameof(deviations));
        priors ??= new CausePriors();
        covariance ??= GeneralisedFit.Independent([.. deviations.Select(d => d.StandardUncertainty)]);
        Cause[] candidates = [.. Candidates(deviations)];
        IReadOnlyList<CauseModel> models = Weigh(deviations, candidates, priors, covariance);
        (Cause Cause, double Probability)[] inclusion =
        [
            .. candidates.Select(cause => (cause, models.Where(model => model.Causes.Contains(cause)).Sum(model => model.Probability)))
                .OrderByDescending(item => item.Item2),
        ];
        (AttributionVerdict verdict, IReadOnlyList<Cause> suspects) = Judge(models, inclusion);
        return new AttributionResult(verdict, suspects, inclusion, models, [.. Alike(deviations, candidates, covariance)]);
    }

    private static IEnumerable<Cause> Candidates(IReadOnlyList<BandDeviation> deviations) => deviations.SelectMany(d => new Cause[]
    {
        new(CauseKind.ThermometerError, d.Source, null),
        new(CauseKind.CoatingEmissivity, d.Source, null),
        new(CauseKind.Gradient, d.Source, null),
        new(CauseKind.ComparatorDrift, d.Comparator, d.Band),
        new(CauseKind.OneBandAbsorption, d.Source, d.Band),
    }).Distinct().Where(cause => deviations.Any(d => d.Sensitivity(cause) != 0));

    private static CauseModel[] Weigh(IReadOnlyList<BandDeviation> deviations, Cause[] candidates, CausePriors priors, double[,] covariance)
    {
        List<Cause[]> sets = [[]];
        for (int i = 0; i < candidates.Length; i++)
        {
            sets.Add([candidates[i]]);
            for (int j = i + 1; j < candidates.Length; j++) sets.Add([candidates[i], candidates[j]]);
        }

        double odds = priors.Probability / (1 - priors.Probability);
        double[] logs = [.. sets.Select(set => LogEvidence(deviations, set, priors, covariance) + set.Length * Math.Log(odds))];
        double most = logs.Max(), total = logs.Sum(log => Math.Exp(log - most));
        return
        [
            .. sets.Select((set, i) => Model(deviations, set, Math.Exp(logs[i] - most) / total, covariance))
                .OrderByDescending(model => model.Probability),
        ];
    }

    private static double LogEvidence(IReadOnlyList<BandDeviation> deviations, Cause[] causes, CausePriors priors, double[,] covariance)
    {
        int n = deviations.Count;
        double[,] total = (double[,])covariance.Clone();
        foreach (Cause cause in causes)
        {
            double size = priors.Size(cause.Kind);
            double[] effect = [.. deviations.Select(d => d.Sensitivity(cause) * size)];
            for (int i = 0; i < n; i++)
            {
                for (int j = 0; j < n; j++) total[i, j] += effect[i] * effect[j];
            }
        }

        if (CholeskyFactor.Of(total) is not { } factor) throw new ArgumentException("The covariance of the deviations is not positive definite.", nameof(covariance));
        double chiSquared = factor.Whiten([.. deviations.Select(d => d.Kelvin)]).Sum(x => x * x);
        return -(chiSquared + factor.LogDeterminant) / 2;
    }

    private static CauseModel Model(IReadOnlyList<BandDeviation> deviations, Cause[] causes, double probability, double[,] covariance)
    {
        double[] kelvin = [.. deviations.Select(d => d.Kelvin)];
        if (causes.Length == 0)
        {
            double chiSquared = CholeskyFactor.Of(covariance)!.Whiten(kelvin).Sum(x => x * x);
            return new CauseModel(causes, probability, [], chiSquared, kelvin.Length);
        }

        var fit = GeneralisedFit.Of([.. deviations.Select(d => causes.Select(d.Sensitivity).ToArray())], kelvin, covariance);
        return fit is null
            ? new CauseModel(causes, probability, [], double.NaN, 0)
            : new CauseModel(causes, probability, fit.Coefficients, fit.ChiSquared, fit.DegreesOfFreedom);
    }

    private static (AttributionVerdict Verdict, IReadOnlyList<Cause> Suspects) Judge(
        IReadOnlyList<CauseModel> models, IReadOnlyList<(Cause Cause, double Probability)> inclusion)
    {
        CauseModel best = models[0];
        if (best.Causes.Count == 0 && best.Probability >= 0.5) return (AttributionVerdict.NothingToExplain, []);
        if (models.All(model => !Fits(model))) return (AttributionVerdict.Unexplained, []);
        Cause[] certain = [.. inclusion.Where(item => item.Probability >= Sure).Select(item => item.Cause)];
        if (certain.Length > 0 && models.Single(model => model.Causes.Count == certain.Length && certain.All(model.Causes.Contains)).Probability >= 0.5)
        {
            return (AttributionVerdict.Explained, certain);
        }

        List<Cause> suspects = [];
        double sum = 0;
        foreach (CauseModel model in models)
        {
            sum += model.Probability;
            foreach (Cause cause in model.Causes)
            {
                if (!suspects.Contains(cause)) suspects.Add(cause);
            }

            if (sum >= Sure) break;
        }

        return suspects.Count == 1 ? (AttributionVerdict.Explained, suspects) : (AttributionVerdict.CannotBeToldApart, suspects);
    }

    /// <summary>A model that determines its sizes and leaves a plausible chi-squared; one without degrees of freedom always fits.</summary>
    private static bool Fits(CauseModel model) => model.DegreesOfFreedom == 0
        ? !double.IsNaN(model.ChiSquared)
        : MathNet.Numerics.SpecialFunctions.GammaUpperRegularized(model.DegreesOfFreedom / 2.0, model.ChiSquared / 2) > TooUnlikely;

    private static IEnumerable<(Cause First, Cause Second)> Alike(IReadOnlyList<BandDeviation> deviations, Cause[] candidates, double[,] covariance)
    {
        CholeskyFactor factor = CholeskyFactor.Of(covariance)!;
        double[] seen = factor.Whiten([.. deviations.Select(d => d.Kelvin)]);
        double[][] patterns = [.. candidates.Select(cause => factor.Whiten([.. deviations.Select(d => d.Sensitivity(cause))]))];
        for (int i = 0; i < candidates.Length; i++)
        {
            for (int j = i + 1; j < candidates.Length; j++)
            {
                if (Distance(patterns[i], patterns[j], seen) < Separation && Distance(patterns[j], patterns[i], seen) < Separation)
                {
                    yield return (candidates[i], candidates[j]);
                }
            }
        }
    }

    /// <summary>What the second pattern leaves of the first one, at the size at which the first fits the deviations.</summary>
    private static double Distance(double[] first, double[] second, double[] seen)
    {
        double own = Dot(first, first), other = Dot(second, second), size = Dot(first, seen) / own;
        return size * size * (own - Dot(first, second) * Dot(first, second) / other);
    }

    private static double Dot(double[] a, double[] b) => a.Zip(b, (x, y) => x * y).Sum();
}
