using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>Live uncertainty budgets.</summary>
internal sealed record BudgetListView([property: Description("One a source, band and set point; the newest decided one.")] IReadOnlyList<BudgetView> Items);
