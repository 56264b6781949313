using LabWatch.Metrology.Uncertainty;
using Xunit;

namespace LabWatch.Metrology.Tests.Uncertainty;

public sealed class ConformityTests
{
    // U = 2 u for normal uncertainty, so that with u = 0.1 the guard band is 0.2 (to 1e-6).
    private static readonly ToleranceInterval UpToOne = ToleranceInterval.AtMost(1);

    [Theory]
    [InlineData(0.79, Decision.Pass)]
    [InlineData(0.81, Decision.ConditionalPass)]
    [InlineData(1.00, Decision.ConditionalPass)]
    [InlineData(1.01, Decision.ConditionalFail)]
    [InlineData(1.19, Decision.ConditionalFail)]
    [InlineData(1.21, Decision.Fail)]
    public void Decide_WithGuardBand_UsesTheFourWords(double value, Decision expected)
    {
        Assert.Equal(expected, Conformity.Decide(new Estimate(value, 0.1), UpToOne, DecisionRule.GuardBand).Decision);
    }

    [Theory]
    [InlineData(1.00, Decision.Pass)]
    [InlineData(1.01, Decision.Fail)]
    public void Decide_BySimpleAcceptance_ComparesTheValueAlone(double value, Decision expected)
    {
        ConformityResult result = Conformity.Decide(new Estimate(value, 0.1), UpToOne, DecisionRule.SimpleAcceptance);

        Assert.Equal(expected, result.Decision);
        Assert.Equal(0, result.GuardBand);
    }

    [Fact]
    public void Decide_GuardBandsThatMeet_NeverPass()
    {
        ConformityResult result = Conformity.Decide(new Estimate(0, 1), ToleranceInterval.Symmetric(1), DecisionRule.GuardBand);

        Assert.Equal(Decision.ConditionalPass, result.Decision);
    }

    [Fact]
    public void Decide_WithFewDegreesOfFreedom_WidensTheGuardBand()
    {
        ConformityResult result = Conformity.Decide(new Estimate(0.5, 0.1, 3), UpToOne, DecisionRule.GuardBand);

        Assert.Equal(0.331, result.GuardBand, 1e-3);
        Assert.Equal(3.31, result.CoverageFactor, 5e-3);
    }

    [Fact]
    public void Decide_WithoutUncertainty_DecidesOnlyWhereNoGuardBandIsAsked()
    {
        Estimate value = new(0.5, double.NaN);

        Assert.Equal(Decision.NotDecided, Conformity.Decide(value, UpToOne, DecisionRule.GuardBand).Decision);
        Assert.Equal(Decision.Pass, Conformity.Decide(value, UpToOne, DecisionRule.SimpleAcceptance).Decision);
        Assert.True(double.IsNaN(Conformity.Probability(value, UpToOne)));
    }

    [Fact]
    public void Decide_WithoutValue_IsNotDecided()
    {
        Assert.Equal(Decision.NotDecided, Conformity.Decide(Estimate.None, UpToOne, DecisionRule.SimpleAcceptance).Decision);
    }

    [Fact]
    public void Probability_OnTheLimit_IsOneHalf()
    {
        Assert.Equal(0.5, Conformity.Probability(new Estimate(1, 0.1), UpToOne), 1e-15);
    }

    [Theory]
    [InlineData(0.5, 1.0)]
    [InlineData(1.5, 0.0)]
    public void Probability_OfAnExactValue_IsZeroOrOne(double value, double expected)
    {
        Assert.Equal(expected, Conformity.Probability(new Estimate(value, 0), UpToOne));
    }
}
