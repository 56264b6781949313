using System.Text.Json.Nodes;
using LabWatch.Metrology.Attribution;

namespace LabWatch.Service.Calc;

/// <summary>Causes of deviations of radiance temperature.</summary>
internal sealed class AttributionCalculator : Calculator
{
    public override string Name => "attribution";

    public override string Summary => "What may lie behind deviations of radiance temperature in several bands, over one source or several.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "deviation = X theta + error; candidates: thermometer (-1 K/K), coating, gradient, comparator drift in a band, absorption of one source in a band",
        "probability of an explanation by none, one or two causes: prior odds^causes x normal density of the deviations with covariance V + X T X'",
        "sizes by generalised least squares; named where a cause is at work with 95 %, else the candidates that cannot be told apart",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "A. C. Aitken, Proc. R. Soc. Edinb. 55 (1935) 42-48", "R. E. Kass and A. E. Raftery, J. Am. Stat. Assoc. 90 (1995) 773-795",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Objects(
            "deviations",
            "one for each source and band",
            CalcField.Text("source", "id of the source"),
            CalcField.Text("comparator", "id of the comparator; the same for all where missing").Optional(),
            CalcField.Text("band", "id of the band"),
            CalcField.Number("deviation_k", "measured less expected radiance temperature, kelvin"),
            CalcField.Positive("u_k", "its standard uncertainty, kelvin"),
            CalcField.Number("k_per_emissivity", "kelvin for a unit of wall emissivity; 0 where missing").Optional(),
            CalcField.Number("k_per_gradient", "kelvin for a kelvin of the assumed gradient; 0 where missing").Optional(),
            CalcField.Number("k_per_signal", "kelvin for a unit of relative signal; 0 where missing").Optional()) with { MaximumItems = 16 },
        CalcField.Number("prior_probability", "probability of each candidate before; 0.02 where missing").Optional() with { Minimum = 1e-6, Maximum = 0.5 },
        CalcField.Positive("prior_thermometer_k", "usual size of a thermometer error, kelvin; 0.1 where missing").Optional(),
        CalcField.Positive("prior_emissivity", "usual change of the wall emissivity; 0.05 where missing").Optional(),
        CalcField.Positive("prior_gradient_k", "usual gradient, kelvin; 0.5 where missing").Optional(),
        CalcField.Positive("prior_signal", "usual relative drift or absorption; 0.005 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("verdict", "nothing-to-explain, explained, cannot-be-told-apart or unexplained"),
        ("suspects", "the causes named, or those that cannot be told apart"),
        ("candidates", "each candidate with its probability to be at work"),
        ("best", "the most probable explanation: causes, sizes in their units with standard uncertainty, chi-squared"),
        ("alike", "pairs that these bands do not separate at the size found"),
    ];

    public override string Example =>
        """
        { "deviations": [
          { "source": "rowan", "band": "0.9", "deviation_k": -0.14, "u_k": 0.02, "k_per_emissivity": 3.74, "k_per_gradient": 0.9, "k_per_signal": 37.4 },
          { "source": "rowan", "band": "1.6", "deviation_k": -0.21, "u_k": 0.02, "k_per_emissivity": 6.65, "k_per_gradient": 0.9, "k_per_signal": 66.5 },
          { "source": "rowan", "band": "3.9", "deviation_k": -0.50, "u_k": 0.02, "k_per_emissivity": 16.1, "k_per_gradient": 0.9, "k_per_signal": 161 } ] }
        """;

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        var usual = new CausePriors();
        var priors = new CausePriors(
            input.Number("prior_probability", usual.Probability),
            input.Number("prior_thermometer_k", usual.ThermometerKelvin),
            input.Number("prior_emissivity", usual.Emissivity),
            input.Number("prior_gradient_k", usual.GradientKelvin),
            input.Number("prior_signal", usual.RelativeSignal));
        AttributionResult attribution = DeviationAttribution.Explain([.. input.Objects("deviations").Select(Deviation)], priors);
        CauseModel best = attribution.Models[0];
        result.Add("verdict", Verdict(attribution.Verdict))
            .Add("suspects", new JsonArray([.. attribution.Suspects.Select(cause => JsonValue.Create(Text(cause)))]))
            .Add("candidates", new JsonArray([.. attribution.Inclusion.Select(item => new JsonObject { ["cause"] = Text(item.Cause), ["probability"] = CalcResult.Number(item.Probability) })]))
            .Add("best", new JsonObject
            {
                ["causes"] = new JsonArray([.. best.Causes.Select(cause => JsonValue.Create(Text(cause)))]),
                ["sizes"] = CalcResult.Numbers(best.Sizes.Select(size => size.Value)),
                ["u_sizes"] = CalcResult.Numbers(best.Sizes.Select(size => size.StandardUncertainty)),
                ["chi_squared"] = CalcResult.Number(best.ChiSquared),
                ["degrees_of_freedom"] = best.DegreesOfFreedom,
                ["probability"] = CalcResult.Number(best.Probability),
            })
            .Add("alike", new JsonArray([.. attribution.Alike.Select(pair => JsonValue.Create($"{Text(pair.First)} | {Text(pair.Second)}"))]))
            .Step("explanations_weighed", attribution.Models.Count);
    }

    private static BandDeviation Deviation(CalcInput item) => new(
        item.Text("source"),
        item.Text("comparator", "comparator"),
        item.Text("band"),
        item.Number("deviation_k"),
        item.Number("u_k"),
        item.Number("k_per_emissivity", 0),
        item.Number("k_per_gradient", 0),
        item.Number("k_per_signal", 0));

    private static string Verdict(AttributionVerdict verdict) => verdict switch
    {
        AttributionVerdict.NothingToExplain => "nothing-to-explain",
        AttributionVerdict.Explained => "explained",
        AttributionVerdict.CannotBeToldApart => "cannot-be-told-apart",
        _ => "unexplained",
    };

    private static string Text(Cause cause)
    {
        string kind = cause.Kind switch
        {
            CauseKind.ThermometerError => "thermometer-error",
            CauseKind.CoatingEmissivity => "coating-emissivity",
            CauseKind.Gradient => "gradient",
            CauseKind.ComparatorDrift => "comparator-drift",
            _ => "one-band-absorption",
        };
        return cause.Band is null ? $"{kind} of {cause.Subject}" : $"{kind} of {cause.Subject} in {cause.Band}";
    }
}
