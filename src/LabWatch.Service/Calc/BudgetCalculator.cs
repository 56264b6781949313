using System.Text.Json.Nodes;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Uncertainty budgets by the law of propagation, with Monte Carlo as the cross-check.</summary>
internal sealed class BudgetCalculator : Calculator
{
    public override string Name => "budget";

    public override string Summary => "Combined and expanded uncertainty of a budget with correlations, and the same by Monte Carlo.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "u_c^2 = sum_i sum_j c_i u_i c_j u_j r_ij",
        "nu_eff = u_c^4 / sum_i (c_i u_i)^4 / nu_i; U = k u_c, k from Student's t",
        "Monte Carlo: value + sum_i c_i (x_i - estimate), inputs drawn from their distributions; adaptive until the digits are stable",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "JCGM 100:2008, equations 13 and 16, G.2b, table G.2",
        "JCGM 101:2008, clauses 6.4, 7.7, 7.9",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("value", "value of the result; 0 where missing").Optional(),
        CalcField.Objects(
            "inputs",
            "lines of the budget",
            CalcField.Text("name", "what contributes; unique"),
            CalcField.NotNegative("u", "standard uncertainty of the input"),
            CalcField.Number("sensitivity", "derivative of the result by the input; 1 where missing").Optional(),
            CalcField.Number("value", "estimate of the input; 0 where missing").Optional(),
            CalcField.Positive("dof", "degrees of freedom; infinite where missing").Optional(),
            CalcField.Choice("shape", "distribution; normal where missing", Slugged<DistributionShape>.Names).Optional()) with { MaximumItems = 500 },
        CalcField.Objects(
            "correlations",
            "correlated pairs",
            CalcField.Text("first", "name of an input"),
            CalcField.Text("second", "name of another input"),
            CalcField.Number("r", "correlation coefficient") with { Minimum = -1, Maximum = 1 }) with { Required = false, MaximumItems = 10_000 },
        CalcField.Positive("coverage_probability", "coverage probability; 0.9545 (two sigma) where missing").Optional() with { Maximum = 0.9999 },
        CalcField.Object(
            "monte_carlo",
            "propagate by Monte Carlo too",
            CalcField.Integer("trials", "number of trials; adaptive where missing", 20_000, 10_000_000).Optional(),
            CalcField.Integer("digits", "significant digits to make stable, adaptive procedure; 2 where missing", 1, 3).Optional(),
            CalcField.Integer("seed", "seed; 1 where missing", 0, long.MaxValue).Optional(),
            CalcField.Flag("shortest", "shortest instead of symmetric interval")).Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("value", "value of the result"),
        ("u", "combined standard uncertainty"),
        ("dof", "effective degrees of freedom; null where infinite"),
        ("k", "coverage factor"),
        ("expanded_u", "expanded uncertainty"),
        ("contributions", "per line: sensitivity times uncertainty, and share of the sum of squares"),
        ("monte_carlo", "mean, u, low, high, trials, stable"),
    ];

    public override string Example => """
        {
          "value": 300.12,
          "inputs": [
            { "name": "reference calibration", "u": 0.01 },
            { "name": "bridge", "u": 0.00005, "sensitivity": 10.2, "shape": "rectangular" },
            { "name": "stability", "u": 0.004, "dof": 9 },
            { "name": "axial uniformity", "u": 0.012, "shape": "rectangular" }
          ],
          "correlations": [ { "first": "reference calibration", "second": "stability", "r": 0.2 } ],
          "monte_carlo": { "trials": 200000, "seed": 1 }
        }
        """;

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        IReadOnlyList<CalcInput> lines = input.Objects("inputs");
        string[] names = [.. lines.Select(line => line.Text("name"))];
        if (names.Distinct(StringComparer.Ordinal).Count() != names.Length)
        {
            input.Reject("not-unique", "inputs", "Two inputs have one name.", "Give each its own.");
            return;
        }

        InputCorrelation[] correlations = [.. input.Objects("correlations").Select(pair => Read(pair, names))];
        if (correlations.Any(pair => pair.First < 0))
        {
            return;
        }

        UncertaintyBudget budget = new([.. lines.Select(Read)], correlations, input.Number("value", 0));
        double probability = input.Number("coverage_probability", CoverageFactor.DefaultProbability);
        Estimate combined = budget.Combined;
        if (double.IsNaN(combined.StandardUncertainty))
        {
            input.Reject("contradiction", "correlations", "These correlations contradict each other: the variance is negative.", "Correct them.");
            return;
        }

        double k = CoverageFactor.For(combined.DegreesOfFreedom, probability);
        result.Add("value", combined.Value).Add("u", combined.StandardUncertainty).Add("dof", combined.DegreesOfFreedom)
            .Add("k", k).Add("expanded_u", k * combined.StandardUncertainty)
            .Add("contributions", (JsonNode)new JsonArray([.. budget.Inputs.Select((line, i) => Contribution(line, budget.ShareOf(i)))]))
            .Step("sum_of_squared_contributions", budget.Inputs.Sum(line => line.Contribution * line.Contribution))
            .Step("variance", combined.StandardUncertainty * combined.StandardUncertainty);
        if (input.Object("monte_carlo") is { } drawn)
        {
            AddMonteCarlo(drawn, budget, probability, result);
        }
    }

    private static BudgetInput Read(CalcInput line) => new(
        line.Text("name"),
        new Estimate(line.Number("value", 0), line.Number("u"), line.Number("dof", double.PositiveInfinity)),
        line.Number("sensitivity", 1),
        Slugged<DistributionShape>.Parse(line.Text("shape", "normal")));

    private static InputCorrelation Read(CalcInput pair, string[] names)
    {
        int first = Array.IndexOf(names, pair.Text("first"));
        int second = Array.IndexOf(names, pair.Text("second"));
        if (first < 0 || second < 0 || first == second)
        {
            pair.Reject("unknown-reference", string.Empty, "A correlation needs the names of two different inputs.", "Use names of the inputs.");
            return new(-1, -1, 0);
        }

        return new(first, second, pair.Number("r"));
    }

    private static JsonObject Contribution(BudgetInput line, double share) => new()
    {
        ["name"] = line.Name,
        ["contribution"] = CalcResult.Number(Math.Abs(line.Contribution)),
        ["share"] = CalcResult.Number(share),
    };

    private static void AddMonteCarlo(CalcInput input, UncertaintyBudget budget, double probability, CalcResult result)
    {
        MonteCarloOptions options = new()
        {
            Trials = input.Has("trials") ? input.Integer("trials") : null,
            SignificantDigits = (int)input.Integer("digits", 2),
            Seed = (ulong)input.Integer("seed", 1),
            ShortestInterval = input.Flag("shortest"),
            CoverageProbability = probability,
        };
        try
        {
            MonteCarloResult drawn = MonteCarloPropagation.Run(budget, options);
            result.Add("monte_carlo", (JsonNode)new JsonObject
            {
                ["mean"] = CalcResult.Number(drawn.Mean),
                ["u"] = CalcResult.Number(drawn.StandardUncertainty),
                ["low"] = CalcResult.Number(drawn.Low),
                ["high"] = CalcResult.Number(drawn.High),
                ["trials"] = drawn.Trials,
                ["stable"] = drawn.IsStable,
            });
        }
        catch (ArgumentException e)
        {
            input.Reject("cannot-draw", string.Empty, e.Message, "Make correlated inputs normal and the correlations consistent, or leave monte_carlo out.");
        }
    }
}
