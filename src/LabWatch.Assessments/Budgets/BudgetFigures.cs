namespace LabWatch.Assessments.Budgets;

/// <summary>How the lines of a budget are named among the figures of its assessment.</summary>
public static class BudgetFigures
{
    private const string Measured = "u-";
    private const string ClaimedLine = "claimed-u-";

    /// <summary>The line that a figure is; null where it is none.</summary>
    public static string? LineOf(string figure)
    {
        ArgumentNullException.ThrowIfNull(figure);
        return figure.StartsWith(ClaimedLine, StringComparison.Ordinal) ? figure[ClaimedLine.Length..]
            : figure.StartsWith(Measured, StringComparison.Ordinal) ? figure[Measured.Length..]
            : null;
    }

    /// <summary>Whether a figure is a line that is measured; else it is claimed.</summary>
    public static bool IsMeasured(string figure)
    {
        ArgumentNullException.ThrowIfNull(figure);
        return figure.StartsWith(Measured, StringComparison.Ordinal);
    }

    /// <summary>Whether a line moves the effective emissivity rather than the temperature.</summary>
    public static bool MovesEmissivity(string line) =>
        line is ContributionName.Emissivity or ContributionName.DiffuseFraction or ContributionName.Numerical or ContributionName.Lip;
}
