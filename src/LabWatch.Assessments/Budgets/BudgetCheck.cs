using LabWatch.Lab.Assessments;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Budgets;

/// <summary>
/// The propagation of distributions (JCGM 101:2008) through T_rad = L^-1(e L(T_ref + d) + (1 - e - p) L(T_bg)), as a check of the law of propagation where the
/// radiance is not linear: d holds what moves the temperature, e what moves the effective emissivity, p is what the profile takes away.
/// </summary>
/// <param name="Low">Lower end of the 95.45 % interval, degree Celsius.</param>
/// <param name="High">Upper end.</param>
/// <param name="StandardUncertainty">Standard deviation of the radiance temperature, kelvin.</param>
/// <param name="Agrees">Whether both ends agree with value and expanded uncertainty to one significant digit of the standard uncertainty (JCGM 101:2008, clause 8).</param>
public sealed record BudgetCheck(double Low, double High, double StandardUncertainty, bool Agrees)
{
    /// <summary>Trials, whole blocks.</summary>
    public const int Trials = 100_000;

    /// <summary>Seed of the trials.</summary>
    public const ulong Seed = 20_260_301;

    private const double IceKelvin = 273.15;

    /// <summary>Checks a budget on record; null where its figures do not suffice.</summary>
    /// <param name="source">The source.</param>
    /// <param name="assessment">An assessment of the criterion <c>budget</c>.</param>
    public static BudgetCheck? Of(ReferenceSource source, Assessment assessment)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(assessment);
        WorkingBand? working = source.Bands.FirstOrDefault(band => band.Id == assessment.Scope);
        double reference = Figure(assessment, FigureName.Mean), emissivity = Figure(assessment, "effective-emissivity");
        double surroundings = Figure(assessment, "surroundings"), isothermal = Figure(assessment, "isothermal-emissivity");
        if (working is null || !double.IsFinite(reference + emissivity + surroundings + isothermal))
        {
            return null;
        }

        RadianceBand band = RadianceBand.Of(working.LowerMicrometre, working.UpperMicrometre);
        double own = reference + IceKelvin, around = surroundings + IceKelvin, deficit = isothermal - emissivity;
        double seen = (emissivity * band.Radiance(own)) + ((1 - isothermal) * band.Radiance(around));
        double slope = band.RadianceSlope(band.Temperature(seen));
        List<BudgetInput> inputs = [];
        foreach (AssessmentFigure figure in assessment.Figures)
        {
            if (BudgetFigures.LineOf(figure.Name) is { } line && figure.Value.Value > 0)
            {
                inputs.Add(Input(line, figure.Value.Value / 1000));
            }
        }

        bool[] ofEmissivity = [.. inputs.Select(input => BudgetFigures.MovesEmissivity(input.Name))];
        UncertaintyBudget budget = new(inputs);
        MonteCarloResult result = MonteCarloPropagation.Run(budget, Model, new Metrology.Uncertainty.MonteCarloOptions { Trials = Trials, Seed = Seed });
        double expanded = Figure(assessment, "coverage-factor") * budget.Combined.StandardUncertainty;
        double value = band.Temperature(seen) - IceKelvin, tolerance = 0.5 * Math.Pow(10, Math.Floor(Math.Log10(result.StandardUncertainty)));
        return new(result.Low, result.High, result.StandardUncertainty, Math.Abs(value - expanded - result.Low) <= tolerance && Math.Abs(value + expanded - result.High) <= tolerance);

        double Model(ReadOnlySpan<double> trial)
        {
            double kelvin = 0, byEmissivity = 0, bySurroundings = 0;
            for (int i = 0; i < trial.Length; i++)
            {
                bySurroundings += inputs[i].Name == ContributionName.Surroundings ? trial[i] : 0;
                byEmissivity += ofEmissivity[i] ? trial[i] : 0;
                kelvin += ofEmissivity[i] || inputs[i].Name == ContributionName.Surroundings ? 0 : trial[i];
            }

            // A line in kelvin is turned back into the radiance that it moves: by the slope at the estimate, so that only the inverse is nonlinear in it.
            double e = emissivity + (byEmissivity * slope / (band.Radiance(own) - band.Radiance(around)));
            double radiance = (e * band.Radiance(own + kelvin)) + ((1 - e - deficit) * band.Radiance(around)) + (bySurroundings * slope);
            return band.Temperature(Math.Max(radiance, double.Epsilon)) - IceKelvin;
        }
    }

    private static BudgetInput Input(string line, double kelvin) =>
        new(line, new Estimate(0, kelvin), 1, line == ContributionName.Stability ? DistributionShape.Rectangular : DistributionShape.Normal);

    private static double Figure(Assessment assessment, string name) => CriterionResult.Figure(assessment.Figures, name);
}
