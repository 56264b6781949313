using System.Diagnostics.CodeAnalysis;
using Xunit;

namespace LabWatch.Metrology.Tests.Checks;

/// <summary>Runs every check of a suite as a test of its own. One derived class a suite.</summary>
public abstract class CheckSuiteTests<TSuite>
    where TSuite : CheckSuite
{
    private static readonly TSuite Suite = CheckSuites.Get<TSuite>();
    private static readonly Dictionary<string, Check> ChecksById = Suite.Checks.ToDictionary(check => check.Id, StringComparer.Ordinal);

    [SuppressMessage("Design", "CA1000", Justification = "The test framework takes member data from a static member of the test class.")]
    public static TheoryData<string> Ids => [.. ChecksById.Keys];

    [Theory]
    [MemberData(nameof(Ids))]
    public void Computed_value_meets_the_published_one(string id)
    {
        Check check = ChecksById[id];
        CheckOutcome outcome = check.Outcome;
        Assert.True(
            outcome.IsMet,
            $"{check.What}: expected {outcome.Expected} within {outcome.Tolerance}, computed {outcome.Computed} ({outcome.Margin} of the tolerance).");
    }
}
