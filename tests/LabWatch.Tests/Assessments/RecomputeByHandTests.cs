using System.Text.Json.Nodes;
using LabWatch.Assessments;
using LabWatch.Assessments.Budgets;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Evaluation;
using LabWatch.Assessments.Forecasts;
using LabWatch.Assessments.Power;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Views;
using LabWatch.Service.Calc;
using LabWatch.Tests.Assessments.Cavities;
using LabWatch.Tests.Assessments.Forecasts;

namespace LabWatch.Tests.Assessments;

/// <summary>
/// What a metrologist does who trusts nobody: takes an assessment as the API serves it, with the readings of its window, and computes its numbers again with
/// <c>labwatch calc</c>. The steps are those of docs/guide/recompute-by-hand.md.
/// </summary>
public sealed class RecomputeByHandTests
{
    private static readonly CavityLab Lab = new();

    [Fact]
    public void Stability_from_the_readings_of_the_window()
    {
        StabilityCriterion criterion = new(StabilityCriterion.DefaultSchedule);
        AssessmentView served = Serve(criterion, out ReadingWindow readings);

        ReadingSeries series = readings.Find("well-bottom")!.Slice(criterion.Schedule.EndingAt(CavityLab.Noon));
        JsonObject answer = Calculate("stability", new JsonObject
        {
            ["value"] = new JsonArray([.. series.Values.ToArray().Select(value => JsonValue.Create(value))]),
            ["time_s"] = new JsonArray([.. series.TimeMicroseconds.ToArray().Select(time => JsonValue.Create(time / 1e6))]),
        });

        Assert.Equal(Number(answer, "half_range") * 1000, served.Value!.Value, 1e-6);
        Assert.Equal(Number(answer, "u_half_range") * 1000, Figure(served, "u-sampling"), 1e-6);
        Assert.Equal(Number(answer, "standard_deviation") * 1000, Figure(served, FigureName.StandardDeviation), 1e-6);
        Assert.Equal(Number(answer, "slope_per_h"), Figure(served, FigureName.Slope), 1e-9);
        double combined = Number(Combine(("sampling", Figure(served, "u-sampling")), ("resolution", Figure(served, "u-resolution")), ("scale", Figure(served, "u-scale"))), "u");
        Assert.Equal(combined, served.StandardUncertainty!.Value, combined * 1e-9);
    }

    [Fact]
    public void Axial_uniformity_from_the_means_of_the_wells()
    {
        AssessmentView served = Serve(new AxialUniformityCriterion(AxialUniformityCriterion.DefaultSchedule, DemoRun.Models), out _);

        (double Value, double U) warm = Both(served, "mean-well-bottom"), cold = Both(served, "mean-well-front");
        JsonObject answer = Combine(("warmest", warm.U), ("coldest", cold.U));

        Assert.Equal((warm.Value - cold.Value) * 1000, served.Value!.Value, 1e-6);
        Assert.Equal(Number(answer, "u") * 1000, served.StandardUncertainty!.Value, 1e-6);
        Decided(served, "simple-acceptance");
    }

    [Fact]
    public void Effective_emissivity_by_the_model_from_geometry_and_optics()
    {
        AssessmentView served = Serve(new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models), out _, "8-14");

        JsonObject cavity = Calculate("cavity", new JsonObject
        {
            ["form"] = "cylinder-outward-cone",
            ["radius_mm"] = 25,
            ["length_mm"] = 200,
            ["cone_half_angle_deg"] = 60,
            ["aperture_radius_mm"] = 20,
            ["view"] = "cone",
            ["view_radius_mm"] = 10,
            ["view_distance_mm"] = 700,
            ["emissivity"] = Figure(served, "wall-emissivity"),
            ["u_emissivity"] = Both(served, "wall-emissivity").U,
        });
        Assert.Equal(Number(cavity, "effective_emissivity"), Figure(served, "isothermal-emissivity"), 1e-9);
        Assert.Equal(1 - Number(cavity, "effective_emissivity"), Figure(served, "reflected-part"), 1e-9);

        // The slope by derivative against a difference over both ends of the standard uncertainty.
        Assert.Equal(Number(cavity, "slope_of_emissivity"), Figure(served, "sensitivity-to-wall-emissivity"), 1e-4);
        Assert.Equal(Math.Abs(Figure(served, "effective-emissivity") - Figure(served, "baseline-emissivity")), served.Value!.Value, 1e-12);
        double combined = Number(Combine([.. ((string[])["wall-emissivity", "diffuse-fraction", "wells", "well-to-wall", "lip", "zones", "method"]).Select(name => (name, Figure(served, "u-" + name)))]), "u");
        Assert.Equal(combined, Both(served, "effective-emissivity").U, combined * 1e-9);
        Decided(served, "simple-acceptance");
    }

    [Fact]
    public void Effective_emissivity_by_the_comparator_from_its_temperature()
    {
        AssessmentView served = Serve(new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models), out _, "comparator");

        JsonObject answer = Calculate("radiance", new JsonObject
        {
            ["lower_um"] = 8,
            ["upper_um"] = 14,
            ["t_c"] = Figure(served, FigureName.Mean),
            ["t_rad_c"] = Figure(served, "comparator-temperature"),
            ["background_c"] = Figure(served, "surroundings"),
        });

        Assert.Equal(Number(answer, "emissivity"), Figure(served, "comparator-isothermal-emissivity"), 1e-8);
        Assert.Equal(Math.Abs(Figure(served, "comparator-emissivity") - Figure(served, "baseline-emissivity")), served.Value!.Value, 1e-12);
        Decided(served, "simple-acceptance");
    }

    [Fact]
    public void Budget_from_its_lines()
    {
        AssessmentView served = Serve(new BudgetCriterion(BudgetCriterion.DefaultSchedule, DemoRun.Models), out _);

        JsonArray lines = new([.. served.Figures.Where(figure => BudgetFigures.LineOf(figure.Name) is not null).Select(figure =>
        {
            JsonObject line = new() { ["name"] = BudgetFigures.LineOf(figure.Name), ["u"] = figure.Value };
            if (served.Figures.FirstOrDefault(other => other.Name == "degrees-of-freedom-" + BudgetFigures.LineOf(figure.Name)) is { Value: { } freedom })
            {
                line["dof"] = freedom;
            }

            return line;
        })]);
        JsonObject answer = Calculate("budget", new JsonObject { ["inputs"] = lines });

        Assert.Equal(Number(answer, "expanded_u"), served.Value!.Value, served.Value.Value * 1e-9);
        Assert.Equal(Number(answer, "k"), Figure(served, "coverage-factor"), 1e-9);
    }

    [Fact]
    public void A_forecast_and_the_smallest_detectable_drift_from_the_day_means()
    {
        DriftForecast forecast = Assert.Single(DriftForecasts.Of(
            new Api.Fakes.SampleLab().Current.Sources[3],
            Enumerable.Range(0, 30).SelectMany(day => TrackedPoints.Of(new Api.Fakes.SampleLab().Current.Sources[3], MadeAssessments.Stability(day, 2 + (0.05 * day) + (0.1 * ((day * 7) % 5)))))));

        JsonObject answer = Calculate("trend", new JsonObject
        {
            ["value"] = new JsonArray([.. forecast.Days.Select(day => JsonValue.Create(day.Value))]),
            ["time_s"] = new JsonArray([.. forecast.Days.Select(day => JsonValue.Create(day.At.Microseconds / 1e6))]),
            ["limit"] = forecast.Limit,
        });
        Assert.Equal(Number(answer, "crossing_s"), forecast.Expected!.Value.Microseconds / 1e6, 1);
        Assert.Equal(Number(answer, "crossing_earliest_s"), forecast.Earliest!.Value.Microseconds / 1e6, 1);
        Assert.Equal(Number(answer, "crossing_latest_s"), forecast.Latest!.Value.Microseconds / 1e6, 1);

        DriftPower power = Assert.Single(MonitoringPower.Of([forecast]));
        JsonObject drift = Calculate("detectable-drift", new JsonObject { ["u_check"] = power.Noise, ["checks"] = 1, ["checks_per_year"] = power.ChecksPerYear });
        Assert.Equal(Number(drift, "drift"), power.AtNextCheck, power.AtNextCheck * 1e-9);
    }

    private static void Decided(AssessmentView served, string rule)
    {
        JsonObject input = new() { ["value"] = served.Value, ["u"] = served.StandardUncertainty, ["upper"] = served.Limit, ["rule"] = rule };
        if (served.DegreesOfFreedom is { } freedom)
        {
            input["dof"] = freedom;
        }

        JsonObject answer = Calculate("decision", input);
        Assert.Equal(answer["decision"]!.GetValue<string>(), served.Decision);
        Assert.Equal(Number(answer, "expanded_u"), served.ExpandedUncertainty!.Value, served.ExpandedUncertainty.Value * 1e-9);
        Assert.Equal(Number(answer, "conformity_probability"), served.ConformityProbability!.Value, 1e-9);
    }

    private static JsonObject Combine(params (string Name, double U)[] lines) => Calculate(
        "budget", new JsonObject { ["inputs"] = new JsonArray([.. lines.Select(line => new JsonObject { ["name"] = line.Name, ["u"] = line.U })]) });

    private static AssessmentView Serve(ICriterion criterion, out ReadingWindow readings, string? scope = null)
    {
        var snapshot = Lab.Snapshot();
        TimeWindow window = criterion.Schedule.EndingAt(CavityLab.Noon);
        readings = Lab.Readings(criterion.Schedule.SpanOf(window), (id, time, value) =>
            (id.StartsWith("well", StringComparison.Ordinal) ? Math.Round(value + (0.01 * TestLab.Noise(time)), 5) : value, ReadingQuality.None));
        CriterionResult result = criterion.Evaluate(new CriterionInput(snapshot, snapshot.Sources[0], window, readings)).First(one => scope is null || one.Scope == scope);
        return AssessmentViews.Of(new Assessment(
            CavityLab.Key, criterion.Code, result.Scope, window, 1, result.Value, result.Unit, result.Limit?.Maximum, result.CoverageFactor, result.Decision, result.ConformityProbability,
            result.Figures, result.Explanation, new Provenance("d", [], [], null, "test"), CavityLab.Noon, null));
    }

    private static JsonObject Calculate(string name, JsonObject input)
    {
        CalcResult? result = Calculators.Find(name)!.Run(input.ToJsonString(), out var findings);
        Assert.True(result is not null, string.Join('\n', findings));
        return (JsonObject)JsonNode.Parse(result.Values.ToJsonString())!;
    }

    private static double Number(JsonObject answer, string name) => answer[name]!.GetValue<double>();

    private static double Figure(AssessmentView served, string name) => served.Figures.Single(figure => figure.Name == name).Value!.Value;

    private static (double Value, double U) Both(AssessmentView served, string name)
    {
        FigureView figure = served.Figures.Single(candidate => candidate.Name == name);
        return (figure.Value!.Value, figure.StandardUncertainty!.Value);
    }
}
