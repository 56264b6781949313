using System.Collections.Concurrent;
using LabWatch.Assessments;
using LabWatch.Assessments.Budgets;
using LabWatch.Assessments.Forecasts;
using LabWatch.Assessments.Power;
using LabWatch.Lab.Assessments;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;
using Microsoft.AspNetCore.Mvc;

namespace LabWatch.Service.Api.Insight;

/// <summary>Live uncertainty budgets, and what the monitoring would miss.</summary>
internal static class BudgetEndpoints
{
    private const int MostChecks = 1000;

    /// <summary>Checks by Monte Carlo by assessment: an assessment never changes, and a check costs some tens of milliseconds.</summary>
    private static readonly ConcurrentDictionary<string, BudgetCheck?> Checks = new(StringComparer.Ordinal);

    /// <summary>Maps the endpoints into the group of the API's version.</summary>
    public static void Map(RouteGroupBuilder api)
    {
        api.MapGet("budgets", BudgetsAsync)
            .WithTags("Sources")
            .Allow(Permission.Read)
            .WithName("ListBudgets")
            .WithSummary("Live uncertainty budget of each source, band and set point beside the CMC")
            .WithDescription(
                "Each contribution as it is measured, else as the lab file claims it; combined by JCGM 100 with effective degrees of freedom, checked by JCGM 101. A live value may raise what is reported, never lower it below the CMC.")
            .ProducesProblem(StatusCodes.Status400BadRequest);
        api.MapGet("power", PowerAsync)
            .WithTags("Sources")
            .Allow(Permission.Read)
            .WithName("ListPower")
            .WithSummary("What the monitoring would miss: the smallest drift that it finds, beside the limits")
            .ProducesProblem(StatusCodes.Status400BadRequest);
    }

    private static async Task<Results<Ok<BudgetListView>, ProblemHttpResult>> BudgetsAsync(
        [FromQuery(Name = "source")] string? source, HttpRequest http, SiteBoard board, AssessmentHistory history, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("source");
        SourceKey? asked = query.Source("source");
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        List<BudgetView> items = [];
        foreach (ReferenceSource one in board.Lab.Sources.Where(candidate => asked is null || candidate.Key == asked))
        {
            IReadOnlyList<Assessment> newest = await history.NewestDecidedAsync(one.Key, CriterionCode.Budget, cancellationToken);
            items.AddRange(await Task.Run(() => newest.OrderBy(budget => budget.Scope, StringComparer.Ordinal).ThenBy(SetPoint).Select(budget => Of(one, budget)).ToList(), cancellationToken));
        }

        return TypedResults.Ok(new BudgetListView(items));
    }

    private static async Task<Results<Ok<DriftPowerListView>, ProblemHttpResult>> PowerAsync(
        [FromQuery(Name = "source")] string? source, HttpRequest http, SiteBoard board, AssessmentHistory history, CancellationToken cancellationToken)
    {
        QueryReader query = new(http.Query);
        query.Allow("source");
        SourceKey? asked = query.Source("source");
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        List<DriftPowerView> items = [];
        foreach (ReferenceSource one in board.Lab.Sources.Where(candidate => asked is null || candidate.Key == asked))
        {
            IReadOnlyList<DriftForecast> forecasts = await history.ForecastsAsync(one.Key, cancellationToken);
            items.AddRange(MonitoringPower.Of(forecasts).Select(row => Of(one, row)));
        }

        DetectableDrift usual = new(1);
        return TypedResults.Ok(new DriftPowerListView(usual.Power, usual.FalseAlarmsPerYear, items));
    }

    private static DriftPowerView Of(ReferenceSource source, DriftPower row) => new(
        source.Key.ToString(), row.Series.Criterion, row.Series.Scope, row.Series.Quantity, row.Series.Unit, Numbers.OrNull(row.Series.SetPointCelsius), row.Days,
        Numbers.OrNull(row.Noise), Numbers.OrNull(row.ChecksPerYear), Numbers.OrNull(row.AtNextCheck), Numbers.OrNull(row.WithinFive), Numbers.OrNull(row.WithinTwenty),
        row.Margin, Names.Of(row.Verdict), row.Explanation);

    private static BudgetView Of(ReferenceSource source, Assessment budget)
    {
        double perUnit = budget.Unit == "K" ? 1000 : 1, expanded = budget.Value.Value * perUnit;
        double? cmc = budget.Limit * perUnit;
        Estimate combined = budget.Figures.First(figure => figure.Name == "radiance-temperature").Value;
        double u = combined.StandardUncertainty * 1000;
        return new(
            source.Key.ToString(),
            budget.Scope,
            Numbers.OrNull(SetPoint(budget)),
            budget.Id,
            budget.Window.End,
            combined.Value,
            u,
            Numbers.OrNull(CriterionResult.Figure(budget.Figures, "effective-degrees-of-freedom")),
            CriterionResult.Figure(budget.Figures, "coverage-factor"),
            expanded,
            cmc,
            Math.Max(expanded, cmc ?? 0),
            cmc is { } limit ? expanded <= limit : null,
            [.. budget.Figures.Select(figure => Line(budget, figure, u)).OfType<BudgetLineView>().OrderByDescending(line => line.StandardUncertaintyMillikelvin)],
            Check(source, budget),
            budget.Explanation);
    }

    private static BudgetLineView? Line(Assessment budget, AssessmentFigure figure, double u)
    {
        if (BudgetFigures.LineOf(figure.Name) is not { } name)
        {
            return null;
        }

        double own = figure.Value.Value;
        bool isMeasured = BudgetFigures.IsMeasured(figure.Name);
        return new(
            name,
            own,
            isMeasured,
            Numbers.OrNull(isMeasured ? CriterionResult.Figure(budget.Figures, "claimed-" + name) : own),
            Numbers.OrNull(CriterionResult.Figure(budget.Figures, "degrees-of-freedom-" + name)),
            u > 0 ? own * own / (u * u) : 0);
    }

    private static BudgetCheckView? Check(ReferenceSource source, Assessment budget)
    {
        if (Checks.Count >= MostChecks)
        {
            Checks.Clear();
        }

        return Checks.GetOrAdd(budget.Id, _ => BudgetCheck.Of(source, budget)) is { } check
            ? new(check.Low, check.High, check.StandardUncertainty * 1000, BudgetCheck.Trials, BudgetCheck.Seed, check.Agrees)
            : null;
    }

    private static double SetPoint(Assessment budget) => Math.Round(CriterionResult.Figure(budget.Figures, FigureName.SetPoint), 1);
}
