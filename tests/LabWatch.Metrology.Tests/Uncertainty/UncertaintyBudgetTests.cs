using FsCheck.Xunit;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class UncertaintyBudgetTests
{
    [Property]
    public bool An_added_uncorrelated_input_never_lowers_the_combined_uncertainty(byte[] draws, byte added)
    {
        BudgetInput[] inputs = [.. draws.Select(draw => Line(draw, 5))];
        double before = new UncertaintyBudget(inputs).Combined.StandardUncertainty;
        return new UncertaintyBudget([.. inputs, Line(added, 3)]).Combined.StandardUncertainty >= before * (1 - 1e-15);
    }

    [Property]
    public bool Order_of_the_inputs_changes_nothing(byte[] draws)
    {
        BudgetInput[] inputs = [.. draws.Select((draw, i) => Line(draw, i + 1))];
        Estimate forward = new UncertaintyBudget(inputs).Combined;
        Estimate backward = new UncertaintyBudget([.. inputs.Reverse()]).Combined;
        return Math.Abs(forward.StandardUncertainty - backward.StandardUncertainty) <= 1e-12 * forward.StandardUncertainty;
    }

    [Theory]
    [InlineData(1, 7)]
    [InlineData(0, 5)]
    [InlineData(-1, 1)]
    public void Correlation_of_two_inputs_adds_or_cancels(double coefficient, double expected)
    {
        UncertaintyBudget budget = new([Line(3, 5), Line(4, 5)], [new InputCorrelation(0, 1, coefficient)]);

        Assert.Equal(expected, budget.Combined.StandardUncertainty, 1e-12);
    }

    [Theory]
    [InlineData(0, 0, 0.5)]
    [InlineData(0, 2, 0.5)]
    [InlineData(0, 1, 1.5)]
    [InlineData(0, 1, double.NaN)]
    public void Impossible_correlation_throws(int first, int second, double coefficient)
    {
        Assert.Throws<ArgumentException>(() => new UncertaintyBudget([Line(3, 5), Line(4, 5)], [new InputCorrelation(first, second, coefficient)]));
    }

    [Fact]
    public void Degrees_of_freedom_that_are_whole_stay_whole()
    {
        CheckRow row = CheckRow.Read("t08_gum_conformity.csv").Single(row => row.Id == GumSuite.TruncationRow);
        UncertaintyBudget budget = new([new("a", new Estimate(0, 10, 5), 1), new("b", new Estimate(0, 20), 1)]);

        Assert.Equal(125, budget.Combined.DegreesOfFreedom, 1e-9);
        Assert.Equal(CheckRow.Parse(row.Expected), CoverageFactor.For(124), 1e-9);
        Assert.NotEqual(CheckRow.Parse(row.Expected), CoverageFactor.For(125), 1e-5);
    }

    [Fact]
    public void Empty_budget_has_no_uncertainty()
    {
        Assert.Equal(new Estimate(7, 0), new UncertaintyBudget([], value: 7).Combined);
    }

    [Fact]
    public void Shares_add_up_to_one()
    {
        UncertaintyBudget budget = new([Line(1, 5), Line(2, 5), Line(3, 5)]);

        Assert.Equal(1, budget.ShareOf(0) + budget.ShareOf(1) + budget.ShareOf(2), 1e-12);
        Assert.Equal(9.0 / 14, budget.ShareOf(2), 1e-12);
    }

    private static BudgetInput Line(byte uncertainty, double degrees) => new("line", new Estimate(0, uncertainty, degrees), 1);
}
