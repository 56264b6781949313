using LabWatch.Metrology.Statistics;
using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class MonteCarloPropagationTests
{
    private static readonly MonteCarloOptions Million = new() { Trials = 1_000_000, CoverageProbability = 0.95, Seed = 11 };

    // JCGM 101:2008, 9.2.2 to 9.2.4, tables 2 to 4 (from memory): Y = X1 + X2 + X3 + X4, symmetric 95 % interval. The second figure is the analytic
    // result that the document states beside it.
    [Theory]
    [InlineData(DistributionShape.Normal, 1, 2.00, 3.92)]
    [InlineData(DistributionShape.Rectangular, 1, 2.00, 3.88)]
    [InlineData(DistributionShape.Rectangular, 10, 10.15, 17.0)]
    public void Additive_model_of_the_standard_gives_its_results(DistributionShape shape, double fourth, double uncertainty, double end)
    {
        BudgetInput[] inputs = [.. new[] { 1, 1, 1, fourth }.Select(u => new BudgetInput("x", new Estimate(0, u), 1, shape))];

        MonteCarloResult result = MonteCarloPropagation.Run(new UncertaintyBudget(inputs), Million);

        Assert.Equal(uncertainty, result.StandardUncertainty, 0.02);
        Assert.Equal(-end, result.Low, 0.06);
        Assert.Equal(end, result.High, 0.06);
    }

    [Theory]
    [InlineData(DistributionShape.Normal)]
    [InlineData(DistributionShape.Rectangular)]
    [InlineData(DistributionShape.Triangular)]
    [InlineData(DistributionShape.Arcsine)]
    public void Every_shape_keeps_estimate_and_standard_uncertainty(DistributionShape shape)
    {
        MonteCarloResult result = MonteCarloPropagation.Run(
            new UncertaintyBudget([new("x", new Estimate(5, 0.5), 2, shape)], value: 10), Million);

        Assert.Equal(10, result.Mean, 0.004);
        Assert.Equal(1, result.StandardUncertainty, 0.003);
    }

    [Fact]
    public void Few_degrees_of_freedom_widen_the_interval_as_students_t_does()
    {
        MonteCarloResult result = MonteCarloPropagation.Run(new UncertaintyBudget([new("x", new Estimate(0, 1, 5), 1)]), Million);

        Assert.Equal(CoverageFactor.For(5, 0.95), result.High, 0.02);
        Assert.Equal(Math.Sqrt(5.0 / 3), result.StandardUncertainty, 0.01);
    }

    [Theory]
    [InlineData(0.8)]
    [InlineData(-0.8)]
    public void Correlated_inputs_agree_with_the_law_of_propagation(double coefficient)
    {
        UncertaintyBudget budget = new(
            [new("a", new Estimate(0, 3), 1), new("b", new Estimate(0, 4), 1), new("c", new Estimate(0, 1), 2)], [new(0, 1, coefficient)]);

        MonteCarloResult result = MonteCarloPropagation.Run(budget, Million);

        Assert.Equal(1, result.StandardUncertainty / budget.Combined.StandardUncertainty, 0.003);
    }

    [Fact]
    public void Correlated_inputs_that_are_not_normal_are_refused()
    {
        UncertaintyBudget budget = new(
            [new("a", new Estimate(0, 3), 1, DistributionShape.Rectangular), new("b", new Estimate(0, 4), 1)], [new(0, 1, 0.5)]);

        Assert.Throws<ArgumentException>(() => MonteCarloPropagation.Run(budget, Million));
    }

    [Fact]
    public void Contradicting_correlations_are_refused()
    {
        BudgetInput[] inputs = [.. Enumerable.Range(0, 3).Select(_ => new BudgetInput("x", new Estimate(0, 1), 1))];
        UncertaintyBudget budget = new(inputs, [new(0, 1, 0.9), new(1, 2, 0.9), new(0, 2, -0.9)]);

        Assert.Throws<ArgumentException>(() => MonteCarloPropagation.Run(budget, Million));
    }

    [Fact]
    public void Same_seed_gives_the_same_result()
    {
        UncertaintyBudget budget = new([new("x", new Estimate(0, 1), 1)]);
        MonteCarloOptions options = new() { Trials = 50_000, Seed = 3 };

        Assert.Equal(MonteCarloPropagation.Run(budget, options), MonteCarloPropagation.Run(budget, options));
    }

    [Fact]
    public void Adaptive_procedure_ends_when_the_digits_are_stable()
    {
        UncertaintyBudget budget = new([new("x", new Estimate(0, 0.7), 1)]);

        MonteCarloResult oneDigit = MonteCarloPropagation.Run(budget, new() { SignificantDigits = 1 });
        MonteCarloResult twoDigits = MonteCarloPropagation.Run(budget, new() { SignificantDigits = 2 });

        Assert.True(oneDigit.IsStable && twoDigits.IsStable);
        Assert.True(oneDigit.Trials < twoDigits.Trials);
        Assert.Equal(0.7, twoDigits.StandardUncertainty, twoDigits.Tolerance);
        Assert.Equal(1.4, twoDigits.High, 0.01);
    }

    [Fact]
    public void Adaptive_procedure_says_when_it_ran_out_of_trials()
    {
        UncertaintyBudget budget = new([new("x", new Estimate(0, 1), 1)]);

        Assert.False(MonteCarloPropagation.Run(budget, new() { SignificantDigits = 3, MaximumTrials = 100_000 }).IsStable);
    }

    [Fact]
    public void Shortest_interval_of_a_skewed_result_is_shorter_than_the_symmetric_one()
    {
        UncertaintyBudget budget = new([new("x", new Estimate(0, 1), 1)]);

        MonteCarloResult symmetric = MonteCarloPropagation.Run(budget, inputs => inputs[0] * inputs[0], Million);
        MonteCarloResult shortest = MonteCarloPropagation.Run(budget, inputs => inputs[0] * inputs[0], Million with { ShortestInterval = true });

        Assert.Equal(0, shortest.Low, 1e-3);
        Assert.True(shortest.High - shortest.Low < symmetric.High - symmetric.Low);

        // Chi squared with one degree of freedom: 3.841 at 95 %.
        Assert.Equal(3.841, shortest.High, 0.04);
    }

    [Fact]
    public void Model_without_a_value_gives_no_result()
    {
        UncertaintyBudget budget = new([new("x", new Estimate(0, 1), 1)]);

        Assert.True(double.IsNaN(MonteCarloPropagation.Run(budget, inputs => Math.Sqrt(inputs[0]), Million).StandardUncertainty));
    }

    [Fact]
    public void Normal_numbers_have_the_moments_and_tails_of_the_normal_distribution()
    {
        Xoshiro256 random = new(5);
        const int count = 2_000_000;
        double sum2 = 0;
        double sum4 = 0;
        int beyond3 = 0;
        int beyond4 = 0;
        for (int i = 0; i < count; i++)
        {
            double z = Ziggurat.Next(ref random);
            sum2 += z * z;
            sum4 += z * z * z * z;
            beyond3 += z > 3 ? 1 : 0;
            beyond4 += z > 4 ? 1 : 0;
        }

        Assert.Equal(1, sum2 / count, 0.004);
        Assert.Equal(3, sum4 / count, 0.04);
        Assert.Equal(NormalDistribution.UpperTail(3), (double)beyond3 / count, 1.1e-4);
        Assert.Equal(NormalDistribution.UpperTail(4), (double)beyond4 / count, 1.7e-5);
    }

    [Fact]
    public void Nth_element_is_that_of_the_sorted_numbers()
    {
        Xoshiro256 random = new(9);
        double[] values = [.. Enumerable.Range(0, 2001).Select(_ => Math.Floor(random.NextUniform() * 50))];
        double[] sorted = [.. values.Order()];
        foreach (int index in new[] { 0, 1, 37, 1000, 1999, 2000 })
        {
            Assert.Equal(sorted[index], Selection.Nth(values, index));
        }
    }
}
