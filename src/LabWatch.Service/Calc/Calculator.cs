using LabWatch.Lab.Findings;

namespace LabWatch.Service.Calc;

/// <summary>One calculator of <c>labwatch calc</c>: the hand-check of a number that the service reports.</summary>
internal abstract class Calculator
{
    /// <summary>Name on the command line.</summary>
    public abstract string Name { get; }

    /// <summary>What it computes, one sentence.</summary>
    public abstract string Summary { get; }

    /// <summary>The formulas, one a line.</summary>
    public abstract IReadOnlyList<string> Formula { get; }

    /// <summary>Where the formulas come from: source and edition, one a line.</summary>
    public abstract IReadOnlyList<string> Source { get; }

    /// <summary>Members of the input.</summary>
    public abstract IReadOnlyList<CalcField> Fields { get; }

    /// <summary>Members of the result, with what they are; one that has no value in a case is null or missing there.</summary>
    public abstract IReadOnlyList<(string Name, string Description)> Outputs { get; }

    /// <summary>An input to start from, as JSON.</summary>
    public abstract string Example { get; }

    /// <summary>
    /// Computes. The input meets <see cref="Fields"/>; what only several members together can violate is reported through
    /// <see cref="CalcInput.Reject"/>, after which the result is not shown.
    /// </summary>
    public abstract void Evaluate(CalcInput input, CalcResult result);

    /// <summary>Checks an input and computes.</summary>
    /// <param name="json">A JSON object as text.</param>
    /// <param name="findings">What is wrong with it; the result is null then.</param>
    public CalcResult? Run(string json, out IReadOnlyList<Finding> findings)
    {
        List<Finding> found = [];
        findings = found;
        if (CalcInput.Read(json, Fields, found) is not { } input)
        {
            return null;
        }

        CalcResult result = new();
        Evaluate(input, result);
        return found.Count == 0 ? result : null;
    }
}
